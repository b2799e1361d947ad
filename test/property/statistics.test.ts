import fc from 'fast-check';
import { expect, test } from 'vitest';
import { benjaminiHochberg } from '../../lib/statistics/false-discovery.ts';
import { mannKendall } from '../../lib/statistics/mann-kendall.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import { median, quantileOfUnsorted, quantileType6, valueAtRank } from '../../lib/statistics/quantile.ts';
import { averageRanks } from '../../lib/statistics/ranks.ts';
import { senSlope } from '../../lib/statistics/sen-slope.ts';
import { ar1VarianceFactor, cutLag1, lag1OfRanks, shrinkLag1 } from '../../lib/statistics/serial-correlation.ts';

/** Whole numbers make exact arithmetic and many ties; a few are missing. */
const whole = fc.integer({ min: -20, max: 20 });
const series = fc.array(whole, { minLength: 2, maxLength: 40 });
const gappy = fc.array(fc.oneof({ weight: 5, arbitrary: whole }, { weight: 1, arbitrary: fc.constant(Number.NaN) }), {
  maxLength: 40,
});
const rising = (length: number) =>
  fc
    .array(fc.integer({ min: 1, max: 4 }), { minLength: length, maxLength: length })
    .map((steps) => steps.map((_, i) => steps.slice(0, i + 1).reduce((a, b) => a + b, 1950)));
const dated = series.chain((x) => rising(x.length).map((t) => ({ t, x })));
const probabilities = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: 30 });

test('mannKendall changes sign, and nothing else, when time runs backwards', () => {
  fc.assert(
    fc.property(gappy, (x) => {
      const forwards = mannKendall(x);
      const backwards = mannKendall([...x].reverse());
      expect(backwards.s + forwards.s).toBe(0);
      expect(backwards.p).toBe(forwards.p);
      expect(backwards.variance).toBe(forwards.variance);
      if (forwards.n > 1) expect(backwards.z + forwards.z).toBe(0);
    }),
  );
});

test('mannKendall depends on the order of values only, not on their size', () => {
  fc.assert(
    fc.property(series, (x) => {
      expect(mannKendall(x.map((value) => value ** 3 + 5))).toEqual(mannKendall(x));
    }),
  );
});

test('mannKendall stays in its bounds: |S| ≤ n(n − 1)/2, |tau| ≤ 1, 0 ≤ p ≤ 1, exact or not', () => {
  fc.assert(
    fc.property(series, fc.boolean(), (x, exact) => {
      const { n, s, tauB, p, variance } = mannKendall(x, { exact });
      expect(Math.abs(s)).toBeLessThanOrEqual((n * (n - 1)) / 2);
      expect(variance).toBeGreaterThanOrEqual(0);
      if (!Number.isNaN(tauB)) expect(Math.abs(tauB)).toBeLessThanOrEqual(1 + 1e-12);
      expect(p).toBeGreaterThanOrEqual(0);
      expect(p).toBeLessThanOrEqual(1);
    }),
  );
});

test('senSlope follows x → a·x + b·t + c, its limits too, and turns over with a negative a', () => {
  fc.assert(
    fc.property(dated, fc.integer({ min: -3, max: 3 }), whole, whole, ({ t, x }, a, b, c) => {
      fc.pre(a !== 0);
      const before = senSlope(t, x);
      const after = senSlope(
        t,
        x.map((value, i) => a * value + b * t[i] + c),
      );
      expect(after.slope).toBeCloseTo(a * before.slope + b, 9);
      // the new term may make or break ties, and with them the width of the interval
      if (b !== 0) return;
      const [low, high] = a > 0 ? [before.low, before.high] : [before.high, before.low];
      expect(after.low).toEqual(Number.isNaN(low) ? low : expect.closeTo(a * low, 9));
      expect(after.high).toEqual(Number.isNaN(high) ? high : expect.closeTo(a * high, 9));
    }),
  );
});

test('senSlope reads the same figures as sorting all slopes would', () => {
  const confidence = fc.double({ min: 0.01, max: 0.999, noNaN: true });
  fc.assert(
    fc.property(dated, confidence, fc.double({ min: 0.01, max: 4, noNaN: true }), ({ t, x }, level, varianceFactor) => {
      const slopes = t.flatMap((time, i) => t.slice(i + 1).map((later, k) => (x[i + 1 + k] - x[i]) / (later - time)));
      const sorted = slopes.sort((a, b) => a - b);
      const reach = normalQuantile(0.5 + level / 2) * Math.sqrt(varianceFactor * mannKendall(x).variance);
      const { slope, low, high, pairs } = senSlope(t, x, { confidence: level, varianceFactor });
      expect(pairs).toBe(sorted.length);
      expect(slope).toBeCloseTo(median(sorted), 12);
      const limits = [(pairs - reach) / 2, (pairs + reach) / 2 + 1].map((rank) => valueAtRank(sorted, rank));
      [low, high].forEach((limit, i) => {
        expect(limit).toEqual(Number.isNaN(limits[i]) ? Number.NaN : expect.closeTo(limits[i], 12));
      });
    }),
    { numRuns: 1000 },
  );
});

test('senSlope lies within its interval, and its sign never opposes S', () => {
  fc.assert(
    fc.property(dated, ({ t, x }) => {
      const { slope, low, high } = senSlope(t, x);
      if (!Number.isNaN(low)) expect(low).toBeLessThanOrEqual(slope);
      if (!Number.isNaN(high)) expect(high).toBeGreaterThanOrEqual(slope);
      expect(slope * mannKendall(x).s).toBeGreaterThanOrEqual(0);
    }),
  );
});

test('averageRanks keeps the sum n(n + 1)/2, and ranks as the values do', () => {
  fc.assert(
    fc.property(gappy, (x) => {
      const ranks = averageRanks(x);
      const present = [...ranks].filter((rank) => !Number.isNaN(rank));
      expect(present.reduce((a, b) => a + b, 0)).toBe((present.length * (present.length + 1)) / 2);
      x.forEach((value, i) => {
        const below = x.filter((other) => other < value).length;
        const upTo = x.filter((other) => other <= value).length;
        expect(ranks[i]).toBe(Number.isNaN(value) ? Number.NaN : (below + 1 + upTo) / 2);
      });
    }),
  );
});

test('quantileType6 lies between the smallest and the largest value and never falls with p', () => {
  fc.assert(
    fc.property(series, fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 20 }), (x, p) => {
      const sorted = Float64Array.from(x).sort();
      const found = p
        .sort((a, b) => a - b)
        .map((each) => quantileType6(sorted, each))
        .filter((value) => !Number.isNaN(value));
      found.forEach((value, i) => {
        expect(value).toBeGreaterThanOrEqual(i ? found[i - 1] - 1e-9 : sorted[0]);
        expect(value).toBeLessThanOrEqual(sorted[sorted.length - 1]);
      });
      expect(quantileType6(sorted, 0.5)).toBeCloseTo(median(x), 9);
    }),
  );
});

test('benjaminiHochberg keeps the order of p, raises none above 1 and lowers none', () => {
  fc.assert(
    fc.property(probabilities, (p) => {
      const adjusted = benjaminiHochberg(p);
      p.forEach((value, i) => {
        expect(adjusted[i]).toBeGreaterThanOrEqual(value);
        expect(adjusted[i]).toBeLessThanOrEqual(1);
        p.forEach((other, j) => {
          if (value <= other) expect(adjusted[i]).toBeLessThanOrEqual(adjusted[j]);
        });
      });
    }),
  );
});

test('benjaminiHochberg rejects at alpha just what the step-up rule of the paper rejects', () => {
  fc.assert(
    fc.property(probabilities, fc.double({ min: 0.001, max: 0.5, noNaN: true }), (p, alpha) => {
      const sorted = [...p].sort((a, b) => a - b);
      const last = sorted.findLastIndex((value, k) => value * (sorted.length / (k + 1)) <= alpha);
      const adjusted = benjaminiHochberg(p);
      expect(adjusted.filter((value) => value <= alpha)).toHaveLength(last + 1);
    }),
  );
});

test('benjaminiHochberg does not depend on the order of its input', () => {
  fc.assert(
    fc.property(probabilities, (p) => {
      expect([...benjaminiHochberg([...p].reverse())].reverse()).toEqual([...benjaminiHochberg(p)]);
    }),
  );
});

test('lag1OfRanks does not depend on the level of the series or the century', () => {
  fc.assert(
    fc.property(dated, fc.integer({ min: -1000, max: 1000 }), ({ t, x }, shift) => {
      const moved = { years: t.map((year) => year + 100), values: x.map((value) => value + shift), slope: 0.25 };
      expect(lag1OfRanks(moved)).toBe(lag1OfRanks({ years: t, values: x, slope: 0.25 }));
    }),
  );
});

test('shrinkLag1 draws every correlation towards the mean, never past it, and keeps their order', () => {
  const correlations = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 1, maxLength: 20 });
  fc.assert(
    fc.property(correlations, fc.integer({ min: 5, max: 100 }), (r, n) => {
      const shrunk = shrinkLag1(
        Float64Array.from(r),
        r.map(() => n),
      );
      const mean = r.reduce((a, b) => a + b, 0) / r.length;
      r.forEach((value, i) => {
        expect(Math.abs(shrunk[i] - mean)).toBeLessThanOrEqual(Math.abs(value - mean) + 1e-12);
        expect((shrunk[i] - mean) * (value - mean)).toBeGreaterThanOrEqual(-1e-12);
      });
    }),
  );
});

test('ar1VarianceFactor is at least 1 for any cut correlation and grows with it', () => {
  fc.assert(
    fc.property(fc.integer({ min: 3, max: 200 }), fc.double({ noNaN: true }), fc.double({ noNaN: true }), (n, a, b) => {
      const [low, high] = [cutLag1(Math.min(a, b)), cutLag1(Math.max(a, b))];
      expect(ar1VarianceFactor(n, low)).toBeGreaterThanOrEqual(1);
      expect(ar1VarianceFactor(n, high)).toBeGreaterThanOrEqual(ar1VarianceFactor(n, low));
    }),
  );
});

test('quantileOfUnsorted is quantileType6 of the sorted values, whatever the order and the gaps', () => {
  const value = fc.oneof(
    { weight: 8, arbitrary: fc.integer({ min: -9, max: 9 }) },
    { weight: 1, arbitrary: fc.constant(Number.NaN) },
  );
  fc.assert(
    fc.property(fc.array(value, { maxLength: 60 }), fc.integer({ min: 0, max: 40 }), (values, fortieths) => {
      const sorted = values.filter((each) => !Number.isNaN(each)).sort((a, b) => a - b);
      const given = Float64Array.from(values);
      expect(quantileOfUnsorted(given, fortieths / 40)).toBe(quantileType6(sorted, fortieths / 40));
      expect(given).toEqual(Float64Array.from(values));
    }),
  );
});
