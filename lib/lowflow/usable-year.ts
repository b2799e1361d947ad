import { isoDate } from '../calendar/day.ts';

/** Share of a year's n-day windows that may be lost to missing days. */
const LOST_WINDOWS_SHARE = 10;
/** Gaps longer than this many days may hide the low… */
const LONGEST_HARMLESS_GAP = 2;
/** …when a flow beside them is under this multiple of the year's minimum. */
const GAP_EDGE_FACTOR = 1.1;

/** One year (or its season), as the rules of a usable year look at it. */
export interface YearFacts {
  /** daily flows of the record, NaN where missing */
  flow: Float64Array;
  /** day number of flow[0] */
  firstDay: number;
  /** first and last day number of the season, both included; days outside the record are missing */
  span: { first: number; last: number };
  /** days of the whole low-flow year: 365 or 366 */
  yearDays: number;
  missingDays: number;
  /** n of the n-day mean */
  days: number;
  /** the year's n-day minimum, NaN when no window is complete */
  minimum: number;
  /** missing days allowed in a whole year */
  maxMissingDays: number;
}

/** Why a year may not be used, in words and figures; empty when it may.
 *
 *  (a) missing days are at most `maxMissingDays` × days in the season / days in the year, as real numbers;
 *  (b) at most 10 % of the n-day windows are lost to missing days;
 *  (c) no gap of more than 2 days has, beside it inside the season, a daily flow below 1.1 × the minimum: the low may
 *      lie inside the gap. */
export function unusableReason(year: YearFacts): string {
  const seasonDays = year.span.last - year.span.first + 1;
  const windows = seasonDays - year.days + 1;
  if (windows < 1) {
    return `no ${year.days}-day window fits into the ${seasonDays} days of the season`;
  }
  if (year.missingDays === 0) return '';

  const reasons: string[] = [];
  // Multiplied out, so that whole numbers are compared and the boundary is exact.
  if (year.missingDays * year.yearDays > year.maxMissingDays * seasonDays) {
    const allowed = (year.maxMissingDays * seasonDays) / year.yearDays;
    reasons.push(`${year.missingDays} of ${seasonDays} days missing, ${figure(allowed)} allowed`);
  }
  const lost = windows - completeWindows(year);
  if (lost * LOST_WINDOWS_SHARE > windows) {
    reasons.push(
      `${lost} of ${windows} ${year.days}-day windows lost to missing days, ${figure(windows / LOST_WINDOWS_SHARE)} allowed`,
    );
  }
  const gap = harmfulGap(year);
  if (gap) {
    reasons.push(
      `a gap of ${gap.length} days from ${isoDate(gap.first)} may hide the low: ${figure(gap.edge)} m³/s beside it is ` +
        `under 1.1 × the minimum of ${figure(year.minimum)} m³/s`,
    );
  }
  return reasons.join('; ');
}

/** Daily flow on a day of the season; NaN where missing and outside the season or the record. */
function flowOn({ flow, firstDay, span }: YearFacts, day: number): number {
  return day < span.first || day > span.last ? Number.NaN : (flow[day - firstDay] ?? Number.NaN);
}

/** Windows of n days without a missing day. */
function completeWindows(year: YearFacts): number {
  let complete = 0;
  let run = 0;
  for (let day = year.span.first; day <= year.span.last; day += 1) {
    run = Number.isNaN(flowOn(year, day)) ? 0 : run + 1;
    if (run >= year.days) complete += 1;
  }
  return complete;
}

/** The first gap that breaks rule (c), with the lower of the flows beside it. */
function harmfulGap(year: YearFacts): { first: number; length: number; edge: number } | null {
  if (Number.isNaN(year.minimum)) return null;
  const { span } = year;
  for (let day = span.first; day <= span.last; day += 1) {
    if (!Number.isNaN(flowOn(year, day))) continue;
    const first = day;
    while (day < span.last && Number.isNaN(flowOn(year, day + 1))) day += 1;
    const length = day - first + 1;
    if (length <= LONGEST_HARMLESS_GAP) continue;
    const [before, after] = [flowOn(year, first - 1), flowOn(year, day + 1)];
    const edge = Number.isNaN(before) || after < before ? after : before;
    if (edge < GAP_EDGE_FACTOR * year.minimum) return { first, length, edge };
  }
  return null;
}

/** A number for a sentence: at most four significant digits, no trailing zeros. */
function figure(value: number): string {
  return String(Number(value.toPrecision(4)));
}
