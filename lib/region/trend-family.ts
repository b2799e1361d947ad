import type { Basis } from '../basis.ts';
import { benjaminiHochberg } from '../statistics/false-discovery.ts';
import { mannKendall } from '../statistics/mann-kendall.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { serialTerms } from './serial-terms.ts';

/** One series of a family of tests: whole years, rising, gaps allowed, and a value for each. */
export interface YearlySeries {
  years: readonly number[];
  values: readonly number[];
  /** names the series' own random stream, where a correction draws one: a station's code */
  label?: string;
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
  /** of the values themselves, pre-whitened or not */
  tau: number;
  /** Benjamini–Hochberg over the family */
  pAdjusted: number;
  /** lag-1 correlation that the test used; NaN when it used none */
  r1: number;
  /** what it multiplied the variance by */
  serialFactor: number;
}

/** Mann–Kendall test and Theil–Sen slope of every series, with the serial correction asked for (`serialTerms`), and
 *  p-values adjusted over the family: all of it, so never over a part that someone is looking at. Slope, its interval and
 *  tau are those of the values as they are under every correction; under `none`, p is exact for up to 10 values without
 *  ties.
 *  @param seed  names the random draws of `block-bootstrap`
 *  Sources: at the functions of `lib/statistics`. */
export function trendFamily(
  family: readonly YearlySeries[],
  serialCorrection: Basis['serialCorrection'],
  seed = '',
): TrendFigures[] {
  const slopes = family.map(({ years, values }) => pairwiseSlopes(years, values));
  const sloped = family.map((series, i) => ({ ...series, slope: slopes[i].slope }));
  const terms = serialTerms(sloped, serialCorrection, seed);

  const figures = family.map(({ values }, i) => {
    const { r1, serialFactor, tested } = terms[i];
    const { z, p, tauB } = mannKendall(tested, { varianceFactor: serialFactor, exact: serialCorrection === 'none' });
    const { slope, intercept, low, high } = slopes[i].withInterval({ varianceFactor: serialFactor });
    return {
      slope,
      intercept,
      low,
      high,
      z,
      p,
      tau: tested === values ? tauB : mannKendall(values).tauB,
      r1,
      serialFactor,
    };
  });
  const adjusted = benjaminiHochberg(figures.map(({ p }) => p));
  return figures.map((each, i) => ({ ...each, pAdjusted: adjusted[i] }));
}
