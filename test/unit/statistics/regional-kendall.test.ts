import { expect, test } from 'vitest';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { randomStream } from '../../../lib/statistics/random.ts';
import { averageRanks } from '../../../lib/statistics/ranks.ts';
import { regionalKendall, type Site } from '../../../lib/statistics/regional-kendall.ts';

const years = Array.from({ length: 15 }, (_, i) => 2000 + i);

/** Whole numbers that sites share in part, with ties, and gaps in some. */
function inventedSites(count: number): Site[] {
  const random = randomStream('regional-kendall.test');
  const weather = years.map(() => random.below(6));
  return Array.from({ length: count }, (_, site) => ({
    years,
    values: years.map((_, i) => (site % 3 === 1 && random.below(5) === 0 ? Number.NaN : weather[i] + random.below(5))),
  }));
}

/** Covariance of two sites as printed: Hirsch & Slack 1984, with n all years and mean ranks for missing values. */
function covariance(g: ArrayLike<number>, h: ArrayLike<number>): number {
  const n = g.length;
  let k = 0;
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++) k += Math.sign((g[j] - g[i]) * (h[j] - h[i])) || 0;
  }
  const filled = (x: ArrayLike<number>) => {
    const present = Array.from(x).filter((value) => !Number.isNaN(value)).length;
    return { present, ranks: averageRanks(x).map((rank) => (Number.isNaN(rank) ? (present + 1) / 2 : rank)) };
  };
  const [first, second] = [filled(g), filled(h)];
  const products = first.ranks.reduce((sum, rank, i) => sum + rank * second.ranks[i], 0);
  return (k + 4 * products - n * (first.present + 1) * (second.present + 1)) / 3;
}

test('regionalKendall sums the covariance of all pairs of sites without looking at pairs of sites', () => {
  const sites = inventedSites(9);
  let all = 0;
  for (const g of sites) for (const h of sites) all += covariance(g.values, h.values);
  const { variance, varianceIndependent, s } = regionalKendall(sites);
  expect(variance).toBeCloseTo(all, 8);
  const own = sites.map(({ values }) => mannKendall(values));
  expect(varianceIndependent).toBeCloseTo(
    own.reduce((sum, each) => sum + each.variance, 0),
    8,
  );
  expect(s).toBe(own.reduce((sum, each) => sum + each.s, 0));
  // sites that share weather vary together
  expect(variance).toBeGreaterThan(1.5 * varianceIndependent);
});

test('regionalKendall of one site is the Mann–Kendall test, ties and gaps too', () => {
  for (const site of inventedSites(3)) {
    const alone = regionalKendall([site], 1.7);
    const { s, variance, z, p } = mannKendall(site.values, { varianceFactor: 1.7 });
    expect(alone).toMatchObject({ s });
    expect(alone.variance).toBeCloseTo(variance, 10);
    expect(alone.varianceIndependent).toBeCloseTo(variance, 10);
    expect(alone.z).toBeCloseTo(z, 12);
    expect(alone.p).toBeCloseTo(p, 12);
  }
});

test('regionalKendall of the same site twice has four times its variance', () => {
  const [site] = inventedSites(1);
  expect(regionalKendall([site, site]).variance).toBeCloseTo(4 * regionalKendall([site]).variance, 10);
});

test('regionalKendall: sites without a year in common are independent', () => {
  const early = { years: [1990, 1991, 1992, 1993], values: [3, 1, 4, 1] };
  const late = { years: [2001, 2002, 2004], values: [5, 9, 2] };
  const { variance, varianceIndependent, s } = regionalKendall([early, late]);
  expect(variance).toBe(varianceIndependent);
  expect(s).toBe(-1 - 1);
});

test('regionalKendall: sites that only mirror each other have no variance and no trend', () => {
  const up = { years: [1, 2, 3], values: [1, 2, 3] };
  const down = { years: [1, 2, 3], values: [3, 2, 1] };
  expect(regionalKendall([up, down])).toMatchObject({ s: 0, variance: 0, z: 0, p: 1, tau: 0 });
});

test('regionalKendall of equal values has z 0 and p 1; a site of one value or none brings nothing in', () => {
  const dry = { years: [1, 2, 3], values: [0, 0, 0] };
  expect(regionalKendall([dry, dry])).toEqual({ s: 0, varianceIndependent: 0, variance: 0, z: 0, p: 1, tau: 0 });
  const [site] = inventedSites(1);
  const nothing = { years, values: new Float64Array(15).fill(Number.NaN) };
  expect(regionalKendall([site, nothing, { years: [2003], values: [1] }])).toEqual(regionalKendall([site]));
});

test('regionalKendall has no answer without a site of two values', () => {
  const none = { s: 0, varianceIndependent: NaN, variance: NaN, z: NaN, p: NaN, tau: NaN };
  expect(regionalKendall([])).toEqual(none);
  expect(regionalKendall([{ years: [1], values: [2] }])).toEqual(none);
  expect(regionalKendall([{ years: [1, 2], values: [NaN, NaN] }])).toEqual(none);
});

test.each([
  [{ years: [1], values: [1, 2] }, 'years and values of site 1 must have the same length, got 1 and 2'],
  [{ years: [1, 1], values: [1, 2] }, 'years of site 1 must rise, got 1 after 1'],
  [{ years: [Infinity], values: [1] }, 'years of site 1 must rise, got Infinity'],
  [{ years: [1, 2], values: [1, -Infinity] }, 'values[1] of site 1 must be a finite number or NaN, got -Infinity'],
])('regionalKendall refuses %j', (site, message) => {
  const good = { years: [1, 2], values: [1, 2] };
  expect(() => regionalKendall([good, site])).toThrow(new RangeError(`regionalKendall: ${message}`));
});

test('regionalKendall refuses a factor that is not positive', () => {
  expect(() => regionalKendall([], 0)).toThrow('regionalKendall: varianceFactor must be a positive number, got 0');
});
