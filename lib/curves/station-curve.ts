import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { medianOfSorted } from '../statistics/quantile.ts';
import { type DurationCurve, durationCurve, flowAtExceedance } from './duration-curve.ts';
import { STANDARD_EXCEEDANCES } from './exceedances.ts';
import { type CurveOptions, flowsOfUsableYears } from './used-days.ts';

/** A station's duration curve at the standard exceedances, with what it rests on. */
export interface StationCurve {
  /** m³/s at STANDARD_EXCEEDANCES; NaN where the days used do not reach */
  flows: Float64Array;
  /** days with a flow, and usable years that they come from */
  days: number;
  years: number;
  /** mean and median of those days, m³/s; NaN when there is none */
  mean: number;
  median: number;
}

/** Period-of-record duration curve of a station over the days of its usable years in the period.
 *  @param minima  annual minima of the same series under the same basis
 *  @param period  [first, last] low-flow years, or null for all
 *  Source: Searcy, 1959, USGS Water-Supply Paper 1542-A. */
export function stationCurve(
  series: DailySeries,
  minima: AnnualMinima,
  options: CurveOptions,
  period: readonly [number, number] | null,
): StationCurve {
  const years = flowsOfUsableYears(series, minima, options, period);
  const curve = durationCurve(concatenate(years));
  return {
    flows: Float64Array.from(STANDARD_EXCEEDANCES, (p) => flowAtExceedance(curve, p)),
    days: curve.n,
    years: years.length,
    ...meanAndMedian(curve),
  };
}

/** Mean and median of the flows of a curve; NaN when it holds none. */
export function meanAndMedian({ sorted, n }: DurationCurve): { mean: number; median: number } {
  if (n === 0) return { mean: Number.NaN, median: Number.NaN };
  let sum = 0;
  // Small flows first, so that they are not lost beside the floods.
  for (let i = n - 1; i >= 0; i -= 1) sum += sorted[i];
  return { mean: sum / n, median: medianOfSorted(sorted) };
}

/** The parts one after another, as a new array. */
export function concatenate(parts: readonly Float64Array[]): Float64Array {
  const whole = new Float64Array(parts.reduce((length, part) => length + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
