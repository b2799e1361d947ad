import fc from 'fast-check';
import { expect, test } from 'vitest';
import { SERIAL_CORRECTIONS } from '../../lib/basis.ts';
import { trendFamily } from '../../lib/region/trend-family.ts';
import { allLagsVarianceFactor } from '../../lib/statistics/all-lags.ts';
import { hodgesLehmann } from '../../lib/statistics/hodges-lehmann.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import { preWhitened, significantLag1 } from '../../lib/statistics/pre-whitening.ts';
import { rankSum } from '../../lib/statistics/rank-sum.ts';
import { regionalKendall } from '../../lib/statistics/regional-kendall.ts';
import { senSlope } from '../../lib/statistics/sen-slope.ts';

/** Whole numbers make exact arithmetic and many ties. */
const whole = fc.integer({ min: -20, max: 20 });
const missing = fc.constant(Number.NaN);
const part = fc.array(whole, { minLength: 1, maxLength: 25 });
const correction = fc.constantFrom(...SERIAL_CORRECTIONS);

/** Years with gaps, and a value for each. */
const yearly = fc
  .array(fc.tuple(fc.constantFrom(1, 1, 1, 2, 5), whole), { minLength: 2, maxLength: 40 })
  .map((steps) => {
    let year = 1950;
    const years = steps.map(([step]) => {
      year += step;
      return year;
    });
    return { years, values: steps.map(([, value]) => value) };
  });
const sloped = yearly.map((series) => ({ ...series, slope: senSlope(series.years, series.values).slope }));

/** Both without an answer, or alike to nine decimals. */
function expectNear(got: number, wanted: number): void {
  if (Number.isNaN(wanted)) expect(got).toBeNaN();
  else expect(got).toBeCloseTo(wanted, 9);
}

/** Sites over the same 12 years. */
const years = Array.from({ length: 12 }, (_, i) => 2001 + i);
const site = fc
  .array(fc.oneof({ weight: 5, arbitrary: whole }, { weight: 1, arbitrary: missing }), { minLength: 12, maxLength: 12 })
  .map((values) => ({ years, values }));
const sites = fc.array(site, { minLength: 1, maxLength: 6 });

test('trendFamily keeps its bounds under every correction: 0 ≤ p ≤ pAdjusted ≤ 1, low ≤ slope ≤ high, factor above 0', () => {
  fc.assert(
    fc.property(fc.array(yearly, { minLength: 1, maxLength: 12 }), correction, (family, serialCorrection) => {
      for (const each of trendFamily(family, serialCorrection, 'seed')) {
        expect(each.p).toBeGreaterThanOrEqual(0);
        expect(each.pAdjusted).toBeGreaterThanOrEqual(each.p);
        expect(each.pAdjusted).toBeLessThanOrEqual(1);
        expect(each.serialFactor).toBeGreaterThan(0);
        if (!Number.isNaN(each.low)) expect(each.low).toBeLessThanOrEqual(each.slope);
        if (!Number.isNaN(each.high)) expect(each.high).toBeGreaterThanOrEqual(each.slope);
      }
    }),
    { numRuns: 60 },
  );
});

test('trendFamily says the same of each series in whatever order they come', () => {
  fc.assert(
    fc.property(fc.array(yearly, { minLength: 2, maxLength: 12 }), correction, (series, serialCorrection) => {
      const family = series.map((each, i) => ({ ...each, label: String(i) }));
      const there = trendFamily(family, serialCorrection, 'seed');
      const back = trendFamily([...family].reverse(), serialCorrection, 'seed').reverse();
      there.forEach((each, i) => {
        // sums over the family in another order differ in the last bits
        for (const key of ['slope', 'z', 'p', 'pAdjusted', 'tau', 'r1', 'serialFactor'] as const) {
          expectNear(back[i][key], each[key]);
        }
      });
    }),
    { numRuns: 60 },
  );
});

test('trendFamily block-bootstrap gives a series the same draws alone and among others', () => {
  fc.assert(
    fc.property(yearly, fc.array(yearly, { maxLength: 4 }), (one, others) => {
      const labelled = { ...one, label: 'A' };
      const [alone] = trendFamily([labelled], 'block-bootstrap', 'seed');
      expect(trendFamily([...others, labelled], 'block-bootstrap', 'seed')[others.length].z).toBe(alone.z);
    }),
    { numRuns: 30 },
  );
});

test('allLagsVarianceFactor follows the order of what the trend leaves, and is the same when time runs backwards', () => {
  fc.assert(
    fc.property(sloped, whole, ({ years, values, slope }, level) => {
      const plain = allLagsVarianceFactor({ years, values, slope });
      expect(plain.factor).toBeGreaterThan(0);
      expect(allLagsVarianceFactor({ years, values: values.map((v) => v + level), slope })).toEqual(plain);
      const turned = {
        years: years.map((year) => -year).reverse(),
        values: [...values].reverse(),
        slope: -slope,
      };
      const { lags, factor } = allLagsVarianceFactor(turned);
      expect(lags).toEqual(plain.lags);
      expect(factor).toBeCloseTo(plain.factor, 9);
    }),
  );
});

test('preWhitened moves with the level of the values, and with nothing to take out leaves them as they are', () => {
  fc.assert(
    fc.property(sloped, fc.double({ min: -0.9, max: 0.9, noNaN: true }), whole, (series, r1, level) => {
      const plain = preWhitened(series, r1);
      const raised = preWhitened({ ...series, values: series.values.map((v) => v + level) }, r1);
      expect(raised.years).toEqual(plain.years);
      raised.values.forEach((value, i) => {
        expect(value - plain.values[i]).toBeCloseTo(level * (1 - r1), 7);
      });
      // with nothing to take out, only the values after a gap are lost
      const untouched = preWhitened(series, 0);
      untouched.years.forEach((year, i) => {
        expect(untouched.values[i]).toBeCloseTo(series.values[series.years.indexOf(year)], 7);
      });
    }),
  );
});

test('significantLag1 is NaN or lies outside its limits and within ±0.95', () => {
  fc.assert(
    fc.property(sloped, (series) => {
      const r1 = significantLag1(series);
      if (Number.isNaN(r1)) return;
      const pairs = series.years.filter((year, i) => i > 0 && year === series.years[i - 1] + 1).length;
      const reach = normalQuantile(0.95) * Math.sqrt(pairs - 1);
      expect(Math.abs(r1)).toBeLessThanOrEqual(0.95);
      expect(r1 * pairs + 1 < -reach || r1 * pairs + 1 > reach || Math.abs(r1) === 0.95).toBe(true);
    }),
  );
});

test('rankSum: turning the parts about turns the sign; only the order of values counts', () => {
  fc.assert(
    fc.property(part, part, (before, after) => {
      const there = rankSum(before, after);
      const back = rankSum(after, before);
      expect(there.u + back.u).toBe(before.length * after.length);
      expect(there.z + back.z).toBeCloseTo(0, 12);
      expect(there.p).toBeGreaterThanOrEqual(0);
      expect(there.p).toBeLessThanOrEqual(1);
      const cubed = (values: number[]) => values.map((v) => v ** 3 - 4);
      expect(rankSum(cubed(before), cubed(after))).toEqual(there);
    }),
  );
});

test('hodgesLehmann is what the rank-sum test does not reject: shifts outside its interval are rejected, those inside not', () => {
  fc.assert(
    fc.property(part, part, fc.integer({ min: -41, max: 40 }), (before, after, step) => {
      const { low, high, difference } = hodgesLehmann(before, after);
      if (Number.isNaN(low) || Number.isNaN(high)) return;
      expect(low).toBeLessThanOrEqual(difference);
      expect(high).toBeGreaterThanOrEqual(difference);
      // half numbers tie with no difference of whole ones
      const shift = step + 0.5;
      const pairs = before.length * after.length;
      const { u } = rankSum(
        before,
        after.map((v) => v - shift),
      );
      // so that the shifted parts hold no tie but their own
      const { variance } = rankSum(
        before,
        after.map((v) => v - 0.5),
      );
      const reach = normalQuantile(0.975) * Math.sqrt(variance);
      const excess = Math.abs(u - pairs / 2);
      if (shift > low && shift < high) expect(excess).toBeLessThanOrEqual(reach + 1);
      if (shift < low || shift > high) expect(excess).toBeGreaterThanOrEqual(reach - 1e-9);
    }),
  );
});

test('hodgesLehmann moves and stretches with the values, and turns about with the parts', () => {
  fc.assert(
    fc.property(part, part, whole, fc.integer({ min: 1, max: 5 }), (before, after, level, scale) => {
      const { difference, low, high } = hodgesLehmann(before, after);
      const moved = hodgesLehmann(
        before.map((v) => scale * v),
        after.map((v) => scale * (v + level)),
      );
      expectNear(moved.difference, scale * (difference + level));
      expectNear(moved.low, scale * (low + level));
      const back = hodgesLehmann(after, before);
      expectNear(back.difference, -difference);
      expectNear(back.low, -high);
      expectNear(back.high, -low);
    }),
  );
});

test('regionalKendall: sites in any order, values by their order only, years that all miss bring nothing in', () => {
  fc.assert(
    fc.property(sites, (all) => {
      const plain = regionalKendall(all);
      expect(regionalKendall([...all].reverse())).toEqual(plain);
      const cubed = all.map(({ values }) => ({ years, values: values.map((v) => v ** 3) }));
      expect(regionalKendall(cubed)).toEqual(plain);
      const longer = all.map(({ values }) => ({ years: [...years, 2050], values: [...values, Number.NaN] }));
      expect(regionalKendall(longer)).toEqual(plain);
      if (!Number.isNaN(plain.variance)) expect(plain.variance).toBeGreaterThanOrEqual(0);
    }),
  );
});

test('regionalKendall changes sign, and nothing else, when time runs backwards', () => {
  fc.assert(
    fc.property(sites, (all) => {
      const plain = regionalKendall(all);
      const back = regionalKendall(all.map(({ values }) => ({ years, values: [...values].reverse() })));
      expect(back.s + plain.s).toBe(0);
      expect(back.variance).toBe(plain.variance);
      expect(back.p).toBe(plain.p);
    }),
  );
});
