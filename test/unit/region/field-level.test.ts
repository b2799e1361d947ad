import { expect, test } from 'vitest';
import { beyondChance } from '../../../lib/region/beyond-chance.ts';
import { chanceSeries } from '../../../lib/region/chance-series.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { trueLevelOf } from '../../../lib/region/true-level.ts';
import { permutedKendall } from '../../../lib/statistics/permuted-kendall.ts';
import { countsByReplicate } from '../../../lib/statistics/trend-bits.ts';
import { noiseRows } from './noise-region.ts';

const REGIONS = 80;
const STATIONS = 40;
const ALPHA = 0.1;
const years = Array.from({ length: 40 }, (_, i) => 1981 + i);

/** Share of regions of 40 stations and 40 years without any trend (cross-correlation 0.5, lag-1 correlation 0.3) in which
 *  more stations fall than chance allows at 5 %. */
function level(serialCorrection: 'ar1-regional' | 'none'): number {
  let beyond = 0;
  for (let region = 0; region < REGIONS; region++) {
    const rows = noiseRows({ stations: STATIONS, years: years.length, lag1: 0.3, shared: 0.5 }, region);
    const figures = trendFamily(
      rows.map((values) => ({ years, values })),
      serialCorrection,
    );
    const tested = rows.map((values, i) => {
      const { serialFactor } = figures[i];
      return { code: String(i), rank: 1, years, values, trendOf: 'minima' as const, serialFactor };
    });
    const series = chanceSeries(tested, { alpha: ALPHA, serialCorrection });
    const bits = permutedKendall({ ...series, replicates: 300, seed: String(region) });
    const counts = countsByReplicate(bits, [...rows.keys()]);
    const falling = figures.filter(({ p, z }) => p < ALPHA && z < 0).length;
    if (beyondChance(counts.falling, falling).p <= 0.05) beyond++;
  }
  return beyond / REGIONS;
}

// methods: 6–9 % with the default correction, 13–23 % without any; the standard error of 80 regions at 8 % is 3 %
test('the count beside chance finds a trend in few regions without one, and in too many when carry-over is left in', () => {
  const corrected = level('ar1-regional');
  expect(corrected).toBeLessThan(0.16);
  const uncorrected = level('none');
  expect(uncorrected).toBeGreaterThan(0.08);
  expect(uncorrected).toBeGreaterThan(corrected);
}, 30_000);

test('trueLevelOf gives the least and the most that was simulated of a method and correction, and null of others', () => {
  const figure = (of: string, value: number) => ({
    claim: 'field-level',
    of,
    setting: '',
    value,
    error: 0,
    cases: 1,
    aim: null,
  });
  const figures = [figure('sieve, ar1', 0.04), figure('sieve, ar1', 0.06), figure('permutation, ar1', 0.5)];
  expect(trueLevelOf('sieve', 'ar1', figures)).toEqual([0.04, 0.06]);
  expect(trueLevelOf('sieve', 'none', figures)).toBeNull();
  expect(trueLevelOf('permutation', 'ar1', [{ ...figures[2], claim: 'else' }])).toBeNull();
});
