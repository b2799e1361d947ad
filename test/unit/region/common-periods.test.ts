import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { AnnualMinima } from '../../../lib/lowflow/annual-minima-types.ts';
import { commonPeriod } from '../../../lib/region/common-period.ts';
import { commonPeriods } from '../../../lib/region/common-periods.ts';
import type { CompletenessRule } from '../../../lib/region/completeness.ts';
import { standingOf } from '../../../lib/region/eligibility.ts';
import { usedYears } from '../../../lib/region/used-years.ts';
import { annualMinima, constant } from './region-fixtures.ts';

/** Records of up to 35 years, begun within 20 years, with unusable years and zeros. */
const value = fc.oneof(
  { weight: 8, arbitrary: fc.constant(1) },
  { weight: 2, arbitrary: fc.constant(Number.NaN) },
  { weight: 1, arbitrary: fc.constant(0) },
);
const station = fc
  .record({ first: fc.integer({ min: 1971, max: 1990 }), values: fc.array(value, { maxLength: 35 }) })
  .map(annualMinima);
const stations = fc.array(station, { maxLength: 8 });
const rule = fc.record({
  minYears: fc.integer({ min: 3, max: 30 }),
  minCoverage: fc.constantFrom(0, 0.5, 0.8, 0.95, 1),
});

/** Every station asked by itself, by the rules by which the ranking asks. */
function countOne(all: readonly AnnualMinima[], period: [number, number], rules: CompletenessRule) {
  const kinds = all.map((one) => standingOf(usedYears(one, period), period, rules).kind);
  const ranked = kinds.filter((kind) => kind === 'ranked').length;
  return { ranked, complete: ranked + kinds.filter((kind) => kind === 'drying').length };
}

describe('commonPeriods', () => {
  test('counts for every period what the ranking’s own rules say of each station', () => {
    fc.assert(
      fc.property(stations, rule, (all, rules) => {
        const { firstYear, years, ranked, complete } = commonPeriods(all, rules);
        const wanted = { ranked: new Int32Array(years * years), complete: new Int32Array(years * years) };
        for (let from = 0; firstYear !== null && from < years; from++) {
          for (let to = from + rules.minYears - 1; to < years; to++) {
            const one = countOne(all, [firstYear + from, firstYear + to], rules);
            wanted.ranked[from * years + to] = one.ranked;
            wanted.complete[from * years + to] = one.complete;
          }
        }
        expect({ ranked, complete }).toEqual(wanted);
      }),
      { numRuns: 40 },
    );
  });

  test('the common period is the one with the most stations × years in these counts', () => {
    fc.assert(
      fc.property(stations, rule, (all, rules) => {
        const { firstYear, years, ranked } = commonPeriods(all, rules);
        const { period, ranked: chosen } = commonPeriod(all, rules);
        const sizes = Array.from(ranked, (count, at) => count * ((at % years) - Math.floor(at / years) + 1));
        const largest = Math.max(0, ...sizes);
        if (largest === 0) {
          expect(chosen).toBe(0);
          return;
        }
        const [first, last] = period!;
        expect(chosen * (last - first + 1)).toBe(largest);
        expect(ranked[(first - firstYear!) * years + last - firstYear!]).toBe(chosen);
      }),
      { numRuns: 200 },
    );
  });

  test('looks at the years between the first and the last usable one of any station', () => {
    const padded = annualMinima({ first: 1979, values: [Number.NaN, ...constant(25), Number.NaN] });
    const counts = commonPeriods([padded], { minYears: 25, minCoverage: 1 });
    expect(counts).toMatchObject({ firstYear: 1980, years: 25 });
    expect(counts.ranked.reduce((sum, one) => sum + one, 0)).toBe(1);
    expect(counts.ranked[24]).toBe(1);
  });

  test('of no station, or none with a usable year, is empty', () => {
    const none = { firstYear: null, years: 0, ranked: new Int32Array(), complete: new Int32Array() };
    expect(commonPeriods([], { minYears: 20, minCoverage: 0.8 })).toEqual(none);
    const empty = annualMinima({ first: 1981, values: constant(40, Number.NaN) });
    expect(commonPeriods([empty], { minYears: 20, minCoverage: 0.8 })).toEqual(none);
  });

  test('refuses rules that make no sense, by its own name', () => {
    expect(() => commonPeriods([], { minYears: 0.5, minCoverage: 1 })).toThrow('commonPeriods: minYears must be');
    expect(() => commonPeriods([], { minYears: 20, minCoverage: 2 })).toThrow('commonPeriods: minCoverage must lie');
  });
});
