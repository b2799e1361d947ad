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
  const gaps = gapsOf(year);
  const lost = windows - completeWindows(gaps, year);
  if (lost * LOST_WINDOWS_SHARE > windows) {
    reasons.push(
      `${lost} of ${windows} ${year.days}-day windows lost to missing days, ${figure(windows / LOST_WINDOWS_SHARE)} allowed`,
    );
  }
  const gap = harmfulGap(gaps, year);
  if (gap) {
    reasons.push(
      `a gap of ${gap.length} days from ${isoDate(gap.first)} may hide the low: ${figure(gap.edge)} m³/s beside it is ` +
        `under 1.1 × the minimum of ${figure(year.minimum)} m³/s`,
    );
  }
  return reasons.join('; ');
}

/** A stretch of missing days inside the season. */
interface Gap {
  /** day numbers, both included */
  first: number;
  last: number;
}

/** The gaps of the season in order; days outside the record are missing. */
function gapsOf({ flow, firstDay, span }: YearFacts): Gap[] {
  const gaps: Gap[] = [];
  const end = Math.min(span.last + 1, firstDay + flow.length);
  let first = span.first;
  // `first` is where the gap that may be open began: at the season's start, or after the last day with a value.
  for (let day = Math.max(span.first, firstDay); day < end; day += 1) {
    if (Number.isNaN(flow[day - firstDay])) continue;
    if (day > first) gaps.push({ first, last: day - 1 });
    first = day + 1;
  }
  if (first <= span.last) gaps.push({ first, last: span.last });
  return gaps;
}

/** Windows of n days without a missing day: those that fit between two gaps. */
function completeWindows(gaps: readonly Gap[], { span, days }: YearFacts): number {
  let complete = 0;
  let from = span.first;
  for (const gap of gaps) {
    complete += Math.max(0, gap.first - from - days + 1);
    from = gap.last + 1;
  }
  return complete + Math.max(0, span.last + 1 - from - days + 1);
}

/** The first gap that breaks rule (c), with the lower of the flows beside it. */
function harmfulGap(
  gaps: readonly Gap[],
  { flow, firstDay, span, minimum }: YearFacts,
): { first: number; length: number; edge: number } | null {
  if (Number.isNaN(minimum)) return null;
  for (const { first, last } of gaps) {
    const length = last - first + 1;
    if (length <= LONGEST_HARMLESS_GAP) continue;
    // Beyond the season's ends there is no flow that counts.
    const before = first > span.first ? flow[first - 1 - firstDay] : Number.POSITIVE_INFINITY;
    const after = last < span.last ? flow[last + 1 - firstDay] : Number.POSITIVE_INFINITY;
    const edge = Math.min(before, after);
    if (edge < GAP_EDGE_FACTOR * minimum) return { first, length, edge };
  }
  return null;
}

/** A number for a sentence: at most four significant digits, no trailing zeros. */
function figure(value: number): string {
  return String(Number(value.toPrecision(4)));
}
