import { expect, test } from 'vitest';
import { SERIAL_CORRECTIONS } from '../../../lib/basis.ts';
import { FEWEST_FOR_REGIONAL } from '../../../lib/region/serial-terms.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { allLagsVarianceFactor } from '../../../lib/statistics/all-lags.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { preWhitened, significantLag1 } from '../../../lib/statistics/pre-whitening.ts';
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
  for (const correction of SERIAL_CORRECTIONS) expect(trendFamily([], correction)).toEqual([]);
});

test('trendFamily all-lags, pre-whitened and block-bootstrap: factor and r1 as they are said to be', () => {
  const each = series(16);
  const { slope } = senSlope(years, each.values);
  const lags = trendFamily([each], 'all-lags')[0];
  expect(lags).toMatchObject({ r1: Number.NaN, serialFactor: allLagsVarianceFactor({ ...each, slope }).factor });
  expect(lags.z).toBe(mannKendall(each.values, { varianceFactor: lags.serialFactor }).z);

  const whitened = trendFamily([each], 'pre-whitened')[0];
  const r1 = significantLag1({ ...each, slope });
  expect(r1).toBeGreaterThan(0);
  expect(whitened).toMatchObject({ r1, serialFactor: 1, tau: mannKendall(each.values).tauB });
  expect(whitened.z).toBe(mannKendall(preWhitened({ ...each, slope }, r1).values).z);

  const blocks = trendFamily([each], 'block-bootstrap', 'seed')[0];
  expect(blocks.r1).toBeNaN();
  expect(blocks.serialFactor).toBeGreaterThan(1);
  const widened = senSlope(years, each.values, { varianceFactor: blocks.serialFactor });
  expect(blocks).toMatchObject({ slope: widened.slope, low: widened.low, high: widened.high });
});

test('trendFamily block-bootstrap draws by seed, label and values, whoever else is in the family', () => {
  const factor = (label: string, seed: string, others = 0) =>
    trendFamily([...family(others), { ...series(4), label }], 'block-bootstrap', seed)[others].serialFactor;
  expect(factor('A', 'seed')).toBe(factor('A', 'seed', 3));
  expect(factor('A', 'seed')).not.toBe(factor('B', 'seed'));
  expect(factor('A', 'seed')).not.toBe(factor('A', 'other'));
});

/** What every correction makes of it: p 1, slope 0 and no correction where nothing differs. */
const LEVEL = { slope: 0, low: 0, high: 0, z: 0, p: 1, tau: Number.NaN, pAdjusted: 1, r1: Number.NaN, serialFactor: 1 };

test.each(SERIAL_CORRECTIONS)(
  'trendFamily %s of equal values and of zeros: no trend, and an interval of nothing',
  (how) => {
    const equal = { years, values: years.map(() => 3.2) };
    const zero = { years, values: years.map(() => 0) };
    expect(trendFamily([equal, zero], how)).toEqual([
      { ...LEVEL, intercept: 3.2 },
      { ...LEVEL, intercept: 0 },
    ]);
  },
);

test.each(SERIAL_CORRECTIONS)('trendFamily %s of no value, one and two: NaN where there is no answer', (how) => {
  const [nothing, one, two] = trendFamily(
    [
      { years: [], values: [] },
      { years: [2001], values: [4] },
      { years: [2001, 2004], values: [4, 1] },
    ],
    how,
  );
  for (const each of [nothing, one]) {
    expect(each).toMatchObject({ slope: NaN, low: NaN, high: NaN, z: NaN, p: NaN, tau: NaN, pAdjusted: NaN });
    expect(each.serialFactor).toBe(1);
  }
  // S = −1, Var S = 1, and the continuity correction leaves nothing of it
  expect(two).toMatchObject({ slope: -1, low: NaN, high: NaN, p: 1, pAdjusted: 1, tau: -1, serialFactor: 1 });
  expect(Math.abs(two.z)).toBe(0);
});

test.each(SERIAL_CORRECTIONS)('trendFamily %s refuses an infinite value', (how) => {
  const values = years.map((year) => (year === 1999 ? Number.POSITIVE_INFINITY : 1));
  expect(() => trendFamily([{ years, values }], how)).toThrow(
    new RangeError('senSlope: x[9] must be a finite number or NaN, got Infinity'),
  );
});
