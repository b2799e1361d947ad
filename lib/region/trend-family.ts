import type { Basis } from '../basis.ts';
import { benjaminiHochberg } from '../statistics/false-discovery.ts';
import { mannKendall } from '../statistics/mann-kendall.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { ar1VarianceFactor, cutLag1, lag1OfRanks, shrinkLag1 } from '../statistics/serial-correlation.ts';

/** From this many series on, their lag-1 correlations are drawn towards their mean. */
export const FEWEST_FOR_REGIONAL = 10;

/** One series of a family of tests: whole years, rising, gaps allowed, and a value for each. */
export interface YearlySeries {
  years: readonly number[];
  values: readonly number[];
}

/** Trend of one series; slopes per year. NaN where there is no answer. */
export interface TrendFigures {
  slope: number;
  /** level of the slope line at calendar year 0 */
  intercept: number;
  /** 95 % interval of the slope */
  low: number;
  high: number;
  z: number;
  p: number;
  tau: number;
  /** Benjamini–Hochberg over the family */
  pAdjusted: number;
  /** lag-1 correlation that the test used; NaN when it used none */
  r1: number;
  /** what it multiplied the variance by */
  serialFactor: number;
}

/** Mann–Kendall test and Theil–Sen slope of every series, with the serial correction asked for, and p-values adjusted
 *  over the family: all of it, so never over a part that someone is looking at.
 *  - `none`: variance as it is; the exact distribution for up to 10 values without ties.
 *  - `ar1`: lag-1 correlation of each series by itself.
 *  - `ar1-regional`: with at least 10 series each correlation is drawn towards the family's mean; fewer: as `ar1`.
 *  A series whose correlation cannot be told takes the family's mean under `ar1-regional`, else none.
 *  Sources: at the functions of `lib/statistics`. */
export function trendFamily(
  family: readonly YearlySeries[],
  serialCorrection: Basis['serialCorrection'],
): TrendFigures[] {
  const slopes = family.map(({ years, values }) => pairwiseSlopes(years, values));
  const correlations =
    serialCorrection === 'none'
      ? new Float64Array(family.length).fill(Number.NaN)
      : Float64Array.from(family, (series, i) => lag1OfRanks({ ...series, slope: slopes[i].slope }));
  const regional = serialCorrection === 'ar1-regional' && family.length >= FEWEST_FOR_REGIONAL;
  const lengths = family.map(({ values }) => values.length);
  const r1 = (regional ? shrinkLag1(correlations, lengths) : correlations).map(cutLag1);

  const figures = family.map(({ values }, i) => {
    const serialFactor = Number.isNaN(r1[i]) ? 1 : ar1VarianceFactor(values.length, r1[i]);
    const { z, p, tauB } = mannKendall(values, { varianceFactor: serialFactor, exact: serialCorrection === 'none' });
    const { slope, intercept, low, high } = slopes[i].withInterval({ varianceFactor: serialFactor });
    return { slope, intercept, low, high, z, p, tau: tauB, r1: r1[i], serialFactor };
  });
  const adjusted = benjaminiHochberg(figures.map(({ p }) => p));
  return figures.map((each, i) => ({ ...each, pAdjusted: adjusted[i] }));
}
