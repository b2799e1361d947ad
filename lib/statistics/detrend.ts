/** Detrended values are rounded to this many decimals, or ties would break in the last bit and move the ranks. */
const DETREND_DECIMALS = 1e9;

export interface DatedValues {
  /** whole years, rising; gaps allowed */
  years: ArrayLike<number>;
  /** one value a year, none missing, same length as `years` */
  values: ArrayLike<number>;
  /** trend to take out, in units of `values` per year */
  slope: number;
}

/** Rounds what was computed from measured values, so that equal ones stay equal: to 9 decimals. */
export function roundDetrended(value: number): number {
  return Math.round(value * DETREND_DECIMALS) / DETREND_DECIMALS;
}

/** Values less slope × years since the first one, rounded to 9 decimals.
 *  Time counts from the first year: with b·1985 in place of b·0 the last bits would differ.
 *  @returns NaN throughout for a single value, which has no slope
 *  @throws RangeError naming `caller` when lengths differ, years do not rise, or a value or the slope of several values is
 *          not a finite number */
export function detrended({ years, values, slope }: DatedValues, caller: string): Float64Array {
  const n = values.length;
  if (years.length !== n) {
    throw new RangeError(`${caller}: years and values must have the same length, got ${years.length} and ${n}`);
  }
  if (n > 1 && !Number.isFinite(slope)) throw new RangeError(`${caller}: slope must be a finite number, got ${slope}`);
  const rest = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    if (i > 0 && !(years[i] > years[i - 1])) {
      throw new RangeError(`${caller}: years must rise, got ${years[i]} after ${years[i - 1]}`);
    }
    if (!Number.isFinite(values[i])) {
      throw new RangeError(`${caller}: values[${i}] must be a finite number, got ${values[i]}`);
    }
    rest[i] = roundDetrended(values[i] - slope * (years[i] - years[0]));
  }
  return rest;
}
