import type { CommonPeriods } from '@/lib/jobs/records-types';

/** A period [first, last] of low-flow years and what it would leave. */
export interface PeriodCount {
  first: number;
  last: number;
  /** stations that would be ranked, and those complete enough whatever their share of zeros */
  ranked: number;
  complete: number;
  stationYears: number;
}

const yearsOf = ({ firstYear, lastYear }: CommonPeriods): number =>
  firstYear === null || lastYear === null ? 0 : lastYear - firstYear + 1;

/** What a period would leave; null outside the records' years or where it is shorter than minYears. */
export function periodCount(periods: CommonPeriods, first: number, last: number): PeriodCount | null {
  const { firstYear, lastYear, basis } = periods;
  if (firstYear === null || lastYear === null || first < firstYear || last > lastYear) return null;
  const length = last - first + 1;
  if (length < basis.minYears) return null;
  const at = (first - firstYear) * yearsOf(periods) + last - firstYear;
  const ranked = periods.ranked[at];
  return { first, last, ranked, complete: periods.complete[at], stationYears: ranked * length };
}

/** All periods that are long enough, those with the most station-years first; of equal ones the later last year, then the
 *  earlier first, as the basis's "common" chooses. */
export function periodsByWorth(periods: CommonPeriods): PeriodCount[] {
  const { firstYear, lastYear, basis } = periods;
  if (firstYear === null || lastYear === null) return [];
  const found: PeriodCount[] = [];
  for (let first = firstYear; first <= lastYear; first++) {
    for (let last = first + basis.minYears - 1; last <= lastYear; last++) {
      const period = periodCount(periods, first, last);
      if (period && period.ranked > 0) found.push(period);
    }
  }
  return found.sort((a, b) => b.stationYears - a.stationYears || b.last - a.last || a.first - b.first);
}

/** The chart: end years from left to right, start years from the top down, in CSS pixels. Only periods of at least
 *  minYears have a cell, so the lower left half is empty. */
export interface PeriodLayout {
  /** first start year and first end year; as many of one as of the other */
  firstStart: number;
  firstEnd: number;
  count: number;
  left: number;
  top: number;
  cellWidth: number;
  cellHeight: number;
  width: number;
  height: number;
}

const LEFT = 52;
const TOP = 30;
const WIDEST = 30;
const LEAST = 3;
const TALLEST = 16;
const MOST_HEIGHT = 560;

/** @returns null when no period is long enough */
export function layOutPeriods(periods: CommonPeriods, width: number): PeriodLayout | null {
  const { firstYear, lastYear, basis } = periods;
  if (firstYear === null || lastYear === null) return null;
  const count = lastYear - firstYear + 2 - basis.minYears;
  if (count < 1) return null;
  const cellWidth = Math.min(WIDEST, Math.max(LEAST, (width - LEFT - 8) / count));
  const cellHeight = Math.min(TALLEST, Math.max(LEAST, MOST_HEIGHT / count), cellWidth);
  return {
    firstStart: firstYear,
    firstEnd: firstYear + basis.minYears - 1,
    count,
    left: LEFT,
    top: TOP,
    cellWidth,
    cellHeight,
    width: Math.ceil(LEFT + count * cellWidth + 8),
    height: Math.ceil(TOP + count * cellHeight + 4),
  };
}

/** The period under a point; null where there is none. */
export function hitPeriod(layout: PeriodLayout, x: number, y: number): [first: number, last: number] | null {
  const column = Math.floor((x - layout.left) / layout.cellWidth);
  const row = Math.floor((y - layout.top) / layout.cellHeight);
  if (column < 0 || row < 0 || column >= layout.count || row > column) return null;
  return [layout.firstStart + row, layout.firstEnd + column];
}

/** Upper left corner of a period's cell. */
export const periodXY = (layout: PeriodLayout, first: number, last: number): [x: number, y: number] => [
  layout.left + (last - layout.firstEnd) * layout.cellWidth,
  layout.top + (first - layout.firstStart) * layout.cellHeight,
];

/** The period that an arrow key leads to: left and right change the end year, up and down the start year. A move that
 *  would make the period too short stays where it is. Null for other keys. */
export function periodAfterKey(
  layout: PeriodLayout,
  from: readonly [number, number] | null,
  key: string,
): [number, number] | null {
  const moves: Record<string, [number, number]> = {
    ArrowLeft: [0, -1],
    ArrowRight: [0, 1],
    ArrowUp: [-1, 0],
    ArrowDown: [1, 0],
    Home: [-layout.count, 0],
    End: [0, layout.count],
  };
  const move = moves[key];
  if (!move) return null;
  const lastEnd = layout.firstEnd + layout.count - 1;
  if (from === null) return [layout.firstStart, lastEnd];
  const first = Math.max(layout.firstStart, from[0] + move[0]);
  const last = Math.min(lastEnd, from[1] + move[1]);
  const isLongEnough = last - first >= layout.firstEnd - layout.firstStart;
  return isLongEnough ? [first, last] : [from[0], from[1]];
}

/** Five steps of stations, from more than none to all that any period keeps: lower end of each, rising.
 *  Example: 31 → [1, 8, 14, 20, 26] */
export function toneSteps(most: number): number[] {
  const steps = Array.from({ length: 5 }, (_, step) => 1 + Math.ceil((step * Math.max(0, most - 1)) / 5));
  return [...new Set(steps)];
}
