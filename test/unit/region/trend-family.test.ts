import { expect, test } from 'vitest';
import { FEWEST_FOR_REGIONAL } from '../../../lib/region/serial-terms.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { ar1VarianceFactor, cutLag1, lag1OfRanks, shrinkLag1 } from '../../../lib/statistics/serial-correlation.ts';

const years = Array.from({ length: 30 }, (_, i) => 1990 + i);
/** Invented series that carry over from year to year, each by another measure. */
const series = (i: number) => {
  let level = 0;
  const values = years.map((_, t) => {
    level = (0.05 * i + 0.1) * level + (((t * 7919 + i * 104729) % 97) - 48) / 10;
    return Math.round(1000 * (level - 0.03 * t)) / 1000;
  });
  return { years, values };
};
const family = (size: number) => Array.from({ length: size }, (_, i) => series(i));
const own = ({ values }: { values: number[] }) => {
  const { slope } = senSlope(years, values);
  return lag1OfRanks({ years, values, slope });
};

test('trendFamily none: no correlation, no factor, and the exact p of short series', () => {
  const [long, short] = trendFamily([series(3), { years: [1, 2, 3, 4, 5], values: [9, 7, 4, 2, 1] }], 'none');
  expect(long).toMatchObject({ r1: Number.NaN, serialFactor: 1, p: mannKendall(series(3).values).p });
  expect(short.p).toBeCloseTo(2 / 120, 14);
});

test('trendFamily ar1: each series with its own correlation, in variance and interval', () => {
  family(12).forEach((each, i) => {
    const figures = trendFamily(family(12), 'ar1')[i];
    const r1 = cutLag1(own(each));
    const factor = ar1VarianceFactor(30, r1);
    expect(figures.r1).toBe(r1);
    expect(figures.serialFactor).toBe(factor);
    expect(figures.z).toBe(mannKendall(each.values, { varianceFactor: factor }).z);
    const { slope, low, high, intercept } = senSlope(years, each.values, { varianceFactor: factor });
    expect(figures).toMatchObject({ slope, low, high, intercept });
  });
});

test('trendFamily ar1 never uses the exact p', () => {
  const short = { years: [1, 2, 3, 4, 5], values: [9, 4, 7, 2, 1] };
  expect(trendFamily([short], 'ar1')[0].p).toBe(
    mannKendall(short.values, { varianceFactor: trendFamily([short], 'ar1')[0].serialFactor }).p,
  );
});

test('trendFamily ar1-regional draws the correlations together from ten series on', () => {
  const ten = trendFamily(family(10), 'ar1-regional').map(({ r1 }) => r1);
  const shrunk = shrinkLag1(Float64Array.from(family(10), own), new Array<number>(10).fill(30)).map(cutLag1);
  expect(ten).toEqual([...shrunk]);
  expect(new Set(shrunk).size).toBeGreaterThanOrEqual(1);
  const nine = trendFamily(family(9), 'ar1-regional');
  expect(nine).toEqual(trendFamily(family(9), 'ar1'));
  expect(FEWEST_FOR_REGIONAL).toBe(10);
});

test('trendFamily: a series without a correlation of its own takes the mean of the region, else none', () => {
  const straight = { years, values: years.map((year) => 4000 - year) };
  const alone = trendFamily([straight], 'ar1')[0];
  expect(alone).toMatchObject({ r1: Number.NaN, serialFactor: 1 });
  const together = trendFamily([...family(10), straight], 'ar1-regional');
  const mean = family(10).reduce((sum, each) => sum + own(each), 0) / 10;
  expect(together[10].r1).toBeCloseTo(cutLag1(mean), 12);
});

test('trendFamily adjusts p over the family', () => {
  const figures = trendFamily(family(3), 'none');
  const smallest = Math.min(...figures.map(({ p }) => p));
  const first = figures.find(({ p }) => p === smallest)!;
  expect(first.pAdjusted).toBeLessThanOrEqual(3 * smallest);
  expect(trendFamily([series(1)], 'none')[0].pAdjusted).toBe(trendFamily([series(1)], 'none')[0].p);
});

test('trendFamily of no series is empty', () => {
  for (const correction of ['none', 'ar1', 'ar1-regional'] as const) expect(trendFamily([], correction)).toEqual([]);
});
