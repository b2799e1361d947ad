import type { ExcludableFlag } from '../basis.ts';
import { firstDayOfLowFlowYear } from '../calendar/low-flow-year.ts';
import { type Season, seasonSpan } from '../calendar/season.ts';
import { type DailySeries, FLAG } from '../series/daily-series.ts';
import { checkDays } from '../series/moving-average.ts';
import { flagBitsPresent, usableFlow } from '../series/usable-flow.ts';
import type { AnnualMinima } from './annual-minima-types.ts';
import { unusableReason } from './usable-year.ts';
import { valuedYears } from './valued-years.ts';
import { yearMinimum } from './year-minimum.ts';

/** The keys of the basis that annual minima read, with `auto` resolved. */
export interface MinimaOptions {
  /** first month of the low-flow year, 1–12 */
  yearStart: number;
  /** months [first, last] inside one low-flow year, or null for the whole year */
  season: Season;
  /** n of the n-day mean, 1–365 */
  days: number;
  /** missing days allowed in a usable whole year, scaled to the season */
  maxMissingDays: number;
  /** flags treated as missing */
  exclude: readonly ExcludableFlag[];
}

const LONGEST_YEAR = 366;

/** Annual n-day minima of one station, every low-flow year from that of its first to that of its last value.
 *
 *  A window counts when all its n days are present and lie inside one low-flow year (and season); means are rounded to
 *  10 significant digits. Years that break a rule of completeness are listed with the reason; their minimum is then
 *  only known to be "at most" the one given. Days outside the record are missing.
 *  @param flow  the usable flow, where the caller has it already
 *  @returns flows in m³/s; no years when the record holds no value
 *  @throws RangeError for a day count, month or season that cannot be, and unlike lengths of values and flags
 *  Source: definition as in Riggs, 1972, Low-flow investigations, USGS TWRI 4-B1; WMO-No. 1029, 2008. */
export function annualMinima(
  series: DailySeries,
  options: MinimaOptions,
  flow: Float64Array = usableFlow(series, options.exclude),
): AnnualMinima {
  checkDays('annualMinima', options.days);
  if (!(options.maxMissingDays >= 0)) {
    throw new RangeError(`annualMinima: maxMissingDays must be at least 0, got ${options.maxMissingDays}`);
  }
  const { yearStart, days } = options;
  const anyFlag = flagBitsPresent(series.flags) !== 0;
  const range = valuedYears(series, yearStart);
  const count = range === null ? 0 : range.last - range.first + 1;
  const result = emptyMinima(count);
  const scratch = new Float64Array(LONGEST_YEAR);

  for (let i = 0; i < count; i += 1) {
    const year = range!.first + i;
    const span = seasonSpan(year, yearStart, options.season);
    const seasonDays = span.last - span.first + 1;
    const yearDays = firstDayOfLowFlowYear(year + 1, yearStart) - firstDayOfLowFlowYear(year, yearStart);
    // The part of the season that the record covers, as indices; `to` is exclusive.
    const from = Math.max(0, span.first - series.firstDay);
    const to = Math.max(from, Math.min(flow.length, span.last + 1 - series.firstDay));

    const seen = observe(flow, from, to);
    const marked = anyFlag ? observeFlags(flow, series.flags, from, to) : { flagged: 0, belowDetection: 0 };
    const zeros = seen.zeros + marked.belowDetection;
    const { minimum, lastIndex } = yearMinimum(flow, from, to - from, days, scratch);
    const reason = Number.isFinite(seen.sum)
      ? unusableReason({
          flow,
          firstDay: series.firstDay,
          span,
          yearDays,
          missingDays: seasonDays - seen.days,
          days,
          minimum,
          maxMissingDays: options.maxMissingDays,
        })
      : 'flows so large that their sum is infinite: correct them in the file';

    result.years[i] = year;
    result.usable[i] = reason === '' ? 1 : 0;
    result.missingDays[i] = seasonDays - seen.days;
    result.minimum[i] = minimum;
    result.day[i] = lastIndex < 0 ? -1 : series.firstDay + lastIndex;
    result.reason[i] = reason;
    result.flaggedDays[i] = marked.flagged;
    result.zeroDays[i] = seen.days === 0 ? Number.NaN : (zeros * seasonDays) / seen.days;
    result.meanFlow[i] = seen.days === 0 ? Number.NaN : seen.sum / seen.days;
  }
  return result;
}

/** Days with a value, their sum and the zeros among them, over the days from..to−1 of a record. */
function observe(flow: Float64Array, from: number, to: number): { days: number; sum: number; zeros: number } {
  // Two sums at once, for one addition would wait for the other. A missing day makes one of them NaN.
  let even = 0;
  let odd = 0;
  let zeros = 0;
  let i = from;
  for (; i + 1 < to; i += 2) {
    even += flow[i];
    odd += flow[i + 1];
    if (flow[i] === 0) zeros += 1;
    if (flow[i + 1] === 0) zeros += 1;
  }
  if (i < to) {
    even += flow[i];
    if (flow[i] === 0) zeros += 1;
  }
  const sum = even + odd;
  return Number.isNaN(sum) ? { ...sumOfPresent(flow, from, to), zeros } : { days: to - from, sum, zeros };
}

/** Days with a value and their sum, where some are missing. */
function sumOfPresent(flow: Float64Array, from: number, to: number): { days: number; sum: number } {
  let days = 0;
  let sum = 0;
  for (let i = from; i < to; i += 1) {
    if (Number.isNaN(flow[i])) continue;
    sum += flow[i];
    days += 1;
  }
  return { days, sum };
}

/** Days with any flag, and days below detection that count as zeros though a value is written. */
function observeFlags(flow: Float64Array, flags: Uint8Array, from: number, to: number) {
  const below = FLAG['below-detection'];
  let flagged = 0;
  let belowDetection = 0;
  for (let i = from; i < to; i += 1) {
    if (flags[i] === 0) continue;
    flagged += 1;
    // A comparison with NaN is false both ways: a missing day is no zero.
    if ((flags[i] & below) !== 0 && (flow[i] > 0 || flow[i] < 0)) belowDetection += 1;
  }
  return { flagged, belowDetection };
}

function emptyMinima(count: number): AnnualMinima {
  return {
    years: new Int32Array(count),
    usable: new Uint8Array(count),
    missingDays: new Int32Array(count),
    minimum: new Float64Array(count),
    day: new Int32Array(count),
    reason: new Array<string>(count).fill(''),
    flaggedDays: new Int32Array(count),
    zeroDays: new Float64Array(count),
    meanFlow: new Float64Array(count),
  };
}
