import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { medianOfSorted, quantileType6 } from '../statistics/quantile.ts';
import { durationCurve, flowAtExceedance } from './duration-curve.ts';
import { STANDARD_EXCEEDANCES } from './exceedances.ts';
import { concatenate, meanAndMedian, type StationCurve } from './station-curve.ts';
import { type CurveOptions, flowsOfUsableYears } from './used-days.ts';

/** The curve of a typical year, and how far the years lie apart. */
export interface MedianAnnualCurve extends StationCurve {
  /** k/(L + 1), k = 1..L, L the days of the shortest usable year; rising */
  exceedances: Float64Array;
  /** median, 10th and 90th percentile of the years' own flows there, m³/s; the band is NaN with fewer than 9 years */
  centre: Float64Array;
  low: Float64Array;
  high: Float64Array;
}

/** Median-annual duration curve: at each exceedance the median of the usable years' own curves, with the band that
 *  holds the middle 80 % of them. Unlike the period-of-record curve, one great drought does not shape its end.
 *
 *  `flows` are the same medians at the standard exceedances, NaN where the shortest year does not reach.
 *  @param minima  annual minima of the same series under the same basis
 *  @param period  [first, last] low-flow years, or null for all
 *  Source: Vogel & Fennessey, 1994, Flow-duration curves I, J. Water Resources Planning and Management 120. */
export function medianAnnualCurve(
  series: DailySeries,
  minima: AnnualMinima,
  options: CurveOptions,
  period: readonly [number, number] | null,
): MedianAnnualCurve {
  const years = flowsOfUsableYears(series, minima, options, period);
  const curves = years.map(durationCurve);
  const shortest = curves.reduce((least, { n }) => Math.min(least, n), curves[0]?.n ?? 0);
  /** The years' flows at one exceedance, rising. */
  const flowsAt = (p: number) => Float64Array.from(curves, (curve) => flowAtExceedance(curve, p)).sort();

  const exceedances = Float64Array.from({ length: shortest }, (_, i) => (i + 1) / (shortest + 1));
  const [centre, low, high] = [0, 1, 2].map(() => new Float64Array(shortest));
  exceedances.forEach((p, i) => {
    const flows = flowsAt(p);
    centre[i] = medianOfSorted(flows);
    low[i] = quantileType6(flows, 0.1);
    high[i] = quantileType6(flows, 0.9);
  });
  const reached = (p: number) => p >= 1 / (shortest + 1) && p <= shortest / (shortest + 1);
  const pooled = durationCurve(concatenate(years));
  return {
    exceedances,
    centre,
    low,
    high,
    flows: Float64Array.from(STANDARD_EXCEEDANCES, (p) => (reached(p) ? medianOfSorted(flowsAt(p)) : Number.NaN)),
    days: pooled.n,
    years: years.length,
    ...meanAndMedian(pooled),
  };
}
