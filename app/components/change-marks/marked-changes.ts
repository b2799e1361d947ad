import { parseIsoDate } from '@/lib/calendar/day';
import { firstDayOfLowFlowYear, lowFlowYearOfDay } from '@/lib/calendar/low-flow-year';
import type { StationChange } from '@/lib/series/station-history';

/** A dated change with the letter that stands for it on every time axis of a page. */
export interface MarkedChange extends StationChange {
  letter: string;
  /** days since 1970-01-01 */
  day: number;
}

/** A station's dated changes, earliest first, lettered a, b, … z, aa, ab. A change without a real date is passed over. */
export function markedChanges(changes: readonly StationChange[]): MarkedChange[] {
  return changes
    .map((change) => ({ ...change, day: parseIsoDate(change.date) }))
    .filter(({ day }) => !Number.isNaN(day))
    .sort((a, b) => a.day - b.day)
    .map((change, index) => ({ ...change, letter: letterOf(index) }));
}

function letterOf(index: number): string {
  const letter = String.fromCharCode(97 + (index % 26));
  return index < 26 ? letter : letterOf(Math.floor(index / 26) - 1) + letter;
}

/** Where a day lies on an axis of low-flow years on which year Y has its middle at Y.
 *  @param yearStart  month in which the low-flow year begins, 1–12
 *  Example: (1 April 1990, 4) → 1989.5, the edge between the years that begin in 1989 and in 1990 */
export function yearPosition(day: number, yearStart: number): number {
  const year = lowFlowYearOfDay(day, yearStart);
  const [from, to] = [year, year + 1].map((each) => firstDayOfLowFlowYear(each, yearStart));
  return year - 0.5 + (day - from) / (to - from);
}

/** Width and height of a letter's tab, pixels. */
export const TAB = { width: 16, height: 15 };

/** A mark at its place, and the row of tabs that keeps it clear of its neighbours. */
export interface PlacedChange extends MarkedChange {
  x: number;
  row: number;
}

/** Places marks on an axis from `left` to `right` pixels; those outside are left out. Tabs that would touch go into further
 *  rows. */
export function placeChanges(
  changes: readonly MarkedChange[],
  xOf: (day: number) => number,
  [left, right]: readonly [number, number],
): PlacedChange[] {
  const ends: number[] = [];
  return changes.flatMap((change) => {
    const x = xOf(change.day);
    if (!(x >= left && x <= right)) return [];
    const free = ends.findIndex((end) => end <= x);
    const row = free < 0 ? ends.length : free;
    ends[row] = x + TAB.width + 2;
    return [{ ...change, x, row }];
  });
}

/** Height that the rows of tabs need above a plot, pixels. */
export const tabsHeight = (placed: readonly PlacedChange[]): number =>
  placed.length === 0 ? 0 : TAB.height * (1 + Math.max(...placed.map(({ row }) => row))) + 2;

/** One change in words. Example: "1990-01-01, dam: Reservoir filled." */
export const changeText = ({ date, kind, note }: StationChange): string => `${date}, ${kind}${note ? `: ${note}` : ''}`;
