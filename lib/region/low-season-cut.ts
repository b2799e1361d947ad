import { type Basis, MONTHS, seasonProblem } from '../basis.ts';
import { firstDayOfLowFlowYear, lowFlowYearOfDay } from '../calendar/low-flow-year.ts';

/** Minima this near to either end of the year may belong to one low season that the year start cuts. */
const FIRST_DAYS = 30;
const LAST_DAYS_BESIDE_WINDOW = 8;
const LARGEST_SHARE = 0.1;
/** Two successive minima nearer than this are likely one low, counted twice. */
const SAME_LOW_DAYS = 60;
/** Longer windows reach the ends of the year wherever it starts, so their dates say nothing about it. */
const LONGEST_WINDOW = 120;

export interface MinimaDates {
  /** low-flow years, rising */
  years: readonly number[];
  /** day number of the minimum of each year */
  days: readonly number[];
}

/** Says when the start of the low-flow year cuts a station's low season: more than 10 % of its minima in the first 30
 *  or last n + 8 days of the year, or successive minima under 60 days apart; with the start month that would do.
 *  @param basis.yearStart  the resolved start month
 *  @returns null when nothing is amiss, without minima, and for windows over 120 days */
export function lowSeasonCut(
  dates: MinimaDates,
  basis: { yearStart: number; days: number; season: Basis['season'] },
): string | null {
  const { yearStart, days: windowDays } = basis;
  const n = dates.days.length;
  if (n === 0 || windowDays > LONGEST_WINDOW) return null;
  const lastDays = windowDays + LAST_DAYS_BESIDE_WINDOW;
  const atEdge = edgeOf(dates.days, yearStart, lastDays).count;
  const { near, pairs } = successiveNear(dates);
  const signs: string[] = [];
  if (atEdge > LARGEST_SHARE * n) {
    signs.push(`${atEdge} of ${n} minima in the first ${FIRST_DAYS} or last ${lastDays} days of the year`);
  }
  if (near > 0) signs.push(`${near} of ${pairs} successive minima under ${SAME_LOW_DAYS} days after the one before`);
  if (!signs.length) return null;
  return `year start cuts its low season (${signs.join('; ')}): ${adviceOn(dates, basis, lastDays)}`;
}

/** Minima near the ends of years that start in a month, and how far all lie from the ends on the mean. */
function edgeOf(days: readonly number[], startMonth: number, lastDays: number): { count: number; distance: number } {
  let count = 0;
  let distance = 0;
  for (const day of days) {
    const year = lowFlowYearOfDay(day, startMonth);
    const after = day - firstDayOfLowFlowYear(year, startMonth);
    const before = firstDayOfLowFlowYear(year + 1, startMonth) - 1 - day;
    if (after < FIRST_DAYS || before < lastDays) count++;
    distance += Math.min(after, before) / days.length;
  }
  return { count, distance };
}

/** Minima of consecutive years, and how many of them follow the one before within 60 days. */
function successiveNear({ years, days }: MinimaDates): { near: number; pairs: number } {
  let near = 0;
  let pairs = 0;
  for (let i = 1; i < years.length; i++) {
    if (years[i] !== years[i - 1] + 1) continue;
    pairs++;
    if (days[i] - days[i - 1] < SAME_LOW_DAYS) near++;
  }
  return { near, pairs };
}

/** The month with the fewest of the present minima at its years' ends; of equal ones that with most room. */
function adviceOn(dates: MinimaDates, basis: { yearStart: number; season: Basis['season'] }, lastDays: number): string {
  let best = { month: 0, count: Number.POSITIVE_INFINITY, distance: 0 };
  for (let month = 1; month <= 12; month++) {
    if (seasonProblem(basis.season, month) !== null) continue;
    const edge = edgeOf(dates.days, month, lastDays);
    if (edge.count < best.count || (edge.count === best.count && edge.distance > best.distance)) {
      best = { month, ...edge };
    }
  }
  if (best.count > LARGEST_SHARE * dates.days.length) return 'no start month would do, its lows come in every season';
  if (best.month === basis.yearStart) return 'no other start month would do better';
  return `a start in ${MONTHS[best.month - 1]} would do`;
}
