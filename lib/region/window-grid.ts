import { FEWEST_WINDOW_YEARS } from './window-types.ts';

/** The axes of a start–end chart, and which usable years each of its windows runs over. */
export interface WindowGrid {
  /** years that some window starts in, and ends in, rising */
  starts: number[];
  ends: number[];
  /** by start: index of the first usable year from it on */
  firstAt: Int32Array;
  /** by end: index of the last usable year up to it */
  lastAt: Int32Array;
}

/** Every start year and end year of a period that have a window of at least 15 usable years.
 *  @param years   usable years, rising
 *  @param period  [first, last]; null: from the first usable year to the last */
export function windowGrid(years: readonly number[], period: readonly [number, number] | null): WindowGrid {
  const n = years.length;
  if (n < FEWEST_WINDOW_YEARS) return { starts: [], ends: [], firstAt: new Int32Array(), lastAt: new Int32Array() };
  const [first, last] = period ?? [years[0], years[n - 1]];
  const starts = yearsBetween(first, years[n - FEWEST_WINDOW_YEARS]);
  const ends = yearsBetween(years[FEWEST_WINDOW_YEARS - 1], last);
  let index = 0;
  const firstAt = Int32Array.from(starts, (start) => {
    while (years[index] < start) index++;
    return index;
  });
  index = 0;
  const lastAt = Int32Array.from(ends, (end) => {
    while (index + 1 < n && years[index + 1] <= end) index++;
    return index;
  });
  return { starts, ends, firstAt, lastAt };
}

function yearsBetween(first: number, last: number): number[] {
  return Array.from({ length: last - first + 1 }, (_, i) => first + i);
}
