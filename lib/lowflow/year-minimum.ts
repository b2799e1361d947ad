import { windowSums } from '../series/moving-average.ts';
import { MEAN_DIGITS, roundSignificant } from '../series/round-significant.ts';

/** The smallest n-day mean of one stretch of days. */
export interface YearMinimum {
  /** rounded to 10 significant digits; NaN when no window is complete */
  minimum: number;
  /** index of the last day of the first window that attains it; −1 when there is none */
  lastIndex: number;
}

/** Smallest n-day mean over the complete windows that lie wholly inside a stretch of a record.
 *
 *  Rounding never changes the order of two means, so the smallest rounded mean is the smallest mean, rounded; only
 *  the windows that could round to it are rounded to find the first.
 *  @param flow     daily flows, NaN where missing; left unchanged
 *  @param from     index of the stretch's first day
 *  @param length   days in the stretch
 *  @param days     window length n
 *  @param scratch  working space of at least `length` elements; overwritten */
export function yearMinimum(
  flow: Float64Array,
  from: number,
  length: number,
  days: number,
  scratch: Float64Array,
): YearMinimum {
  const windows = windowSums(flow, from, length, days, scratch);
  let smallest = Number.POSITIVE_INFINITY;
  // NaN is not smaller than anything: incomplete windows pass by.
  for (let i = 0; i < windows; i += 1) if (scratch[i] < smallest) smallest = scratch[i];
  if (smallest === Number.POSITIVE_INFINITY) return { minimum: Number.NaN, lastIndex: -1 };

  const minimum = roundSignificant(smallest / days, MEAN_DIGITS);
  // Two values that round to the same 10 digits differ by less than 1e-9 of themselves.
  const candidate = smallest + Math.abs(smallest) * 2e-9;
  let first = 0;
  while (!(scratch[first] <= candidate && roundSignificant(scratch[first] / days, MEAN_DIGITS) === minimum)) first += 1;
  return { minimum, lastIndex: from + first + days - 1 };
}
