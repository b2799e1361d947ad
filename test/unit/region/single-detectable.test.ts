import { expect, test } from 'vitest';
import { detectablePercent } from '../../../lib/region/single-detectable.ts';
import { singleTrend } from '../../../lib/region/single-trend.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { seeded } from '../../seeded.ts';

const YEARS = Array.from({ length: 40 }, (_, i) => 1981 + i);
const random = seeded(3);
const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
const terms = { mean: 10, serialCorrection: 'none', alpha: 0.1, seed: 'x' } as const;

test('a series that falls by its detectable trend is found to fall in about four cases of five', () => {
  const series = { years: YEARS, values: YEARS.map(() => 10 + normal()), label: 'A' };
  const percent = detectablePercent(series, singleTrend(series, terms), terms);
  expect(percent).not.toBeNull();
  const slope = ((percent ?? 0) / 100) * (terms.mean / 10);
  const spread = Math.sqrt(series.values.reduce((sum, value) => sum + (value - 10) ** 2, 0) / 40);
  let found = 0;
  const cases = 500;
  for (let i = 0; i < cases; i++) {
    const { p } = mannKendall(YEARS.map((_, t) => spread * normal() - slope * t));
    if (p < terms.alpha) found += 1;
  }
  // 0.8 ± what 500 cases and a spread known from 40 values leave open
  expect(found / cases).toBeGreaterThan(0.72);
  expect(found / cases).toBeLessThan(0.9);
});

test('the same seed gives the same figure, and a wider spread a larger one', () => {
  const noise = YEARS.map(() => normal());
  const detectable = (spread: number) => {
    const series = { years: YEARS, values: noise.map((each) => 10 + spread * each), label: 'A' };
    return detectablePercent(series, singleTrend(series, terms), terms) ?? Number.NaN;
  };
  expect(detectable(1)).toBe(detectable(1));
  expect(detectable(3) / detectable(1)).toBeCloseTo(3, 6);
});

test('there is none without a trend, above no mean, and where years do not follow one another', () => {
  const series = { years: YEARS, values: YEARS.map(() => 10 + normal()) };
  const trend = singleTrend(series, terms);
  expect(detectablePercent(series, null, terms)).toBeNull();
  expect(detectablePercent(series, trend, { ...terms, mean: 0 })).toBeNull();
  const scattered = { ...series, years: YEARS.map((_, i) => 1900 + 2 * i) };
  expect(detectablePercent(scattered, singleTrend(scattered, terms), terms)).toBeNull();
});
