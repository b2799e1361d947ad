/** What is found of a region as a whole where no station has a trend. */
import { trendFamily } from '../../lib/region/trend-family.ts';
import { twoSidedP } from '../../lib/statistics/normal.ts';
import { regionalKendall } from '../../lib/statistics/regional-kendall.ts';
import { ar1VarianceFactor, cutLag1 } from '../../lib/statistics/serial-correlation.ts';
import type { Scenario } from './figure.ts';
import { noise, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const NOMINAL = 0.05;
const years = yearsFrom(1980, YEARS);

type Variance = 'sites as independent' | 'with covariance' | 'with covariance and carry-over';

function commonTrends(variance: Variance, lag1: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: STATIONS, years: YEARS, lag1, shared: 0.5 }, 'common', lag1, i);
    const sites = rows.map((values) => ({ years, values: [...values] }));
    if (variance === 'with covariance and carry-over') {
      const r1 = trendFamily(sites, 'ar1-regional').map((figures) => figures.r1);
      const mean = cutLag1(r1.reduce((sum, r) => sum + r, 0) / r1.length);
      return regionalKendall(sites, ar1VarianceFactor(YEARS, mean)).p < NOMINAL ? 1 : 0;
    }
    const { s, p, varianceIndependent } = regionalKendall(sites);
    if (variance === 'with covariance') return p < NOMINAL ? 1 : 0;
    return twoSidedP((s - Math.sign(s)) / Math.sqrt(varianceIndependent)) < NOMINAL ? 1 : 0;
  });
}

export const regional: Scenario[] = (
  ['sites as independent', 'with covariance', 'with covariance and carry-over'] as const
).flatMap((of) =>
  [0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'regional-kendall',
      of,
      setting: `lag-1 ${lag1}`,
      aim: of === 'with covariance and carry-over' ? [null, 0.07] : undefined,
      cases: of === 'with covariance and carry-over' ? 6000 : 2000,
      run: (size) => commonTrends(of, lag1, size),
    }),
  ),
);
