import type { DailySeries } from '../series/daily-series.ts';
import { medianOfSorted } from '../statistics/quantile.ts';
import type { Finding } from './finding.ts';
import { type MonthlyLevels, monthlyLevels } from './monthly-levels.ts';

/** Factors between units that are mistaken for one another, each also upside down: ft³/s and m³/s, m³/s and ft³/s, m³/s and
 *  L/s, m³/s and ML/d (or L/s and m³/d), L/s and ML/d, ft³/s and ML/d. */
const UNIT_FACTORS = [28.316846592, 35.3146667, 1000, 86.4, 1000 / 86.4, 2.4465755, 0.0864];
const LOG_FACTORS = UNIT_FACTORS.flatMap((factor) => [Math.log(factor), -Math.log(factor)]);

const MONTHS = 12;
/** Logarithms this near are equal, also in a record without any spread of its own. */
const SMALLEST_TOLERANCE = 0.05;
/** Steps of the yearly level that the river makes by itself stay within this many of its own standard deviations, and so does what it
 *  adds to a unit's factor. */
const NATURAL_SPREADS = 4;
/** From the last day of the old unit to the first of the new one the flow changes by the factor, give or take this: most
 *  days differ from the day before by far less… */
const DAY_TOLERANCE = Math.log(1.5);
/** …and give or take this share of the factor's logarithm, which holds for the whole stretch as well. */
const TOLERANCE_SHARE = 0.25;
/** Two days further apart than this say nothing. */
const LONGEST_GAP_DAYS = 5;
/** Where the two days do not say it, for a gap or a flood, the level must stand out by more… */
const SPREADS_WITHOUT_DAYS = 6;
/** …and the two months must differ by the factor, give or take this share of its logarithm. */
const MONTH_TOLERANCE_SHARE = 0.5;
/** Standard deviation of a normal sample over its median absolute deviation. */
const MAD_TO_SD = 1.4826;

interface Edge {
  /** the first month in the new unit */
  month: number;
  /** logarithm of the factor, above 0 upwards */
  step: number;
  /** the same as observed, by the days or else by the levels */
  observed: number;
}

/** Whole years in another unit than the years around them.
 *
 *  At the edge of a month the mean of the logarithms, freed of the seasons, of the 12 months after differs from that of
 *  the 12 months before by the logarithm of a unit's factor. It differs by more than 4 standard deviations of such
 *  differences in this record (by their median absolute deviation), so that natural dry and wet years pass; a factor that
 *  the river's own swings reach cannot be told and is not. And from the one day to the other the flow jumps by that
 *  factor, within 1.5, as hardly a river does on such a day; where a flood or a gap hides that, 6 standard deviations and
 *  a like step between the two months are asked. The whole stretch must then agree with the factor. Years are any 12 months: units change at the turn of calendar and of
 *  water years. Of the stretches between the edges, those not at the level of most months are told.
 *  @returns detail: `factor`, of the unit nearest; `ratio`, as observed against the months beside the stretch's edge */
export function unitChanges(series: DailySeries): Finding[] {
  const months = monthlyLevels(series);
  const edges = edgesOf(series.values, months);
  if (edges.length === 0) return [];
  const starts = [0, ...edges.map(({ month }) => month), months.level.length];
  const offsets = [0];
  for (const { step } of edges) offsets.push(snapped(offsets[offsets.length - 1] + step));
  const usual = usualOffset(starts, offsets);
  return offsets.flatMap((offset, i): Finding[] => {
    if (offset === usual) return [];
    const [from, end] = [months.from[starts[i]], months.end[starts[i + 1] - 1]];
    const level = meanLevel(months.level, starts[i], starts[i + 1]);
    const step = level - besideLevel(months.level, starts, offsets, i, usual);
    if (Math.abs(step - (offset - usual)) > TOLERANCE_SHARE * Math.abs(offset - usual)) return [];
    return [
      {
        ...{ kind: 'unit-change', firstDay: series.firstDay + from, lastDay: series.firstDay + end - 1 },
        days: valuedDays(series.values, from, end),
        detail: { factor: rounded(Math.exp(factorOf(edges, offsets, i, usual))), ratio: Math.exp(step) },
      },
    ];
  });
}

/** The months at which the unit changes. Of neighbouring months that would do, the one whose days agree best. */
function edgesOf(values: Float64Array, months: MonthlyLevels): Edge[] {
  const differences = differencesOf(months.level);
  const spread = spreadOf(differences);
  const found: (Edge & { misfit: number })[] = [];
  for (let month = MONTHS; month + MONTHS <= months.level.length; month++) {
    const difference = differences[month - MONTHS];
    if (Math.abs(difference) < NATURAL_SPREADS * spread) continue;
    const edge = edgeByDays(values, months, month, spread) ?? edgeByMonths(months, month, { difference, spread });
    if (!edge || Math.abs(difference - edge.step) > Math.max(NATURAL_SPREADS * spread, SMALLEST_TOLERANCE)) continue;
    const last = found[found.length - 1];
    if (!last || month - last.month >= MONTHS) found.push(edge);
    else if (edge.misfit < last.misfit) found[found.length - 1] = edge;
  }
  return found;
}

/** An edge that its two days tell: they tell factors apart that two years do not. */
function edgeByDays(values: Float64Array, months: MonthlyLevels, month: number, spread: number) {
  const days = dayStep(values, months, month);
  if (days === null) return null;
  const step = nearestFactor(days);
  const misfit = Math.abs(days - step);
  const tolerance = Math.min(DAY_TOLERANCE, TOLERANCE_SHARE * Math.abs(step));
  return misfit <= tolerance && Math.abs(step) >= NATURAL_SPREADS * spread
    ? { month, step, observed: days, misfit }
    : null;
}

/** An edge that only the level tells; of neighbours one whose days tell it is better. */
function edgeByMonths({ level }: MonthlyLevels, month: number, { difference, spread }: Record<string, number>) {
  const step = nearestFactor(difference);
  if (Math.min(Math.abs(step), Math.abs(difference)) < SPREADS_WITHOUT_DAYS * spread) return null;
  const misfit = Math.abs(level[month] - level[month - 1] - step);
  return misfit <= MONTH_TOLERANCE_SHARE * Math.abs(step)
    ? { month, step, observed: difference, misfit: DAY_TOLERANCE + misfit }
    : null;
}

/** At every month that has 12 before it and 12 from it on: the level of the latter less that of the former. */
function differencesOf(level: readonly number[]): number[] {
  const before = [0];
  for (const value of level) before.push(before[before.length - 1] + value);
  const differences: number[] = [];
  for (let month = MONTHS; month + MONTHS <= level.length; month++) {
    differences.push((before[month + MONTHS] - 2 * before[month] + before[month - MONTHS]) / MONTHS);
  }
  return differences;
}

function spreadOf(differences: readonly number[]): number {
  return MAD_TO_SD * medianOfSorted(Float64Array.from(differences, Math.abs).sort());
}

function nearestFactor(difference: number): number {
  return LOG_FACTORS.reduce((best, log) => (Math.abs(log - difference) < Math.abs(best - difference) ? log : best));
}

/** Logarithm of the flow on the first day above zero of a month over that on the last such day before; null when they lie
 *  too far apart. */
function dayStep(values: Float64Array, { from, end }: MonthlyLevels, month: number): number | null {
  let after = from[month];
  while (after < end[month] && !(values[after] > 0)) after++;
  let before = end[month - 1] - 1;
  while (before >= from[month - 1] && !(values[before] > 0)) before--;
  return after - before > LONGEST_GAP_DAYS ? null : Math.log(values[after] / values[before]);
}

/** Steps there and back come to nothing, also where two factors lie near each other. */
const snapped = (offset: number): number => (Math.abs(offset) < 0.3 ? 0 : offset);

/** The offset of most months; of equals, that of the first. */
function usualOffset(starts: readonly number[], offsets: readonly number[]): number {
  const months = new Map<number, number>();
  offsets.forEach((offset, i) => {
    months.set(offset, (months.get(offset) ?? 0) + starts[i + 1] - starts[i]);
  });
  return [...months].reduce((best, one) => (one[1] > best[1] ? one : best))[0];
}

/** Logarithm of the factor of a stretch: the nearest to what its two edges say together, since 28.3 and 35.3 lie near each
 *  other. */
function factorOf(edges: readonly Edge[], offsets: readonly number[], i: number, usual: number): number {
  const observed: number[] = [];
  if (i > 0 && offsets[i - 1] === usual) observed.push(edges[i - 1].observed);
  if (offsets[i + 1] === usual) observed.push(-edges[i].observed);
  return observed.length === 0 ? offsets[i] - usual : nearestFactor(meanLevel(observed, 0, observed.length));
}

/** Mean level of the year on either side of a stretch, where that has the usual unit. */
function besideLevel(
  level: readonly number[],
  starts: readonly number[],
  offsets: readonly number[],
  i: number,
  usual: number,
): number {
  const beside: number[] = [];
  if (i > 0 && offsets[i - 1] === usual) beside.push(...level.slice(Math.max(0, starts[i] - MONTHS), starts[i]));
  if (offsets[i + 1] === usual) beside.push(...level.slice(starts[i + 1], starts[i + 1] + MONTHS));
  if (beside.length > 0) return meanLevel(beside, 0, beside.length);
  const all = level.filter((_, month) => offsets[starts.findLastIndex((start) => start <= month)] === usual);
  return meanLevel(all, 0, all.length);
}

const meanLevel = (level: readonly number[], from: number, end: number): number =>
  level.slice(from, end).reduce((sum, value) => sum + value, 0) / (end - from);

function valuedDays(values: Float64Array, from: number, end: number): number {
  let days = 0;
  for (let day = from; day < end; day++) if (!Number.isNaN(values[day])) days++;
  return days;
}

const rounded = (factor: number): number => Number(factor.toPrecision(4));
