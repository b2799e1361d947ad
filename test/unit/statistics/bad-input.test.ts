/** What no sample should be, through every function that takes one: an answer that is written down here, or a refusal. */
import { describe, expect, test } from 'vitest';
import { allLagsVarianceFactor } from '../../../lib/statistics/all-lags.ts';
import { blockBootstrapFactor } from '../../../lib/statistics/block-bootstrap.ts';
import { benjaminiHochberg } from '../../../lib/statistics/false-discovery.ts';
import { hodgesLehmann } from '../../../lib/statistics/hodges-lehmann.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { pettitt } from '../../../lib/statistics/pettitt.ts';
import { preWhitened, significantLag1 } from '../../../lib/statistics/pre-whitening.ts';
import { median } from '../../../lib/statistics/quantile.ts';
import { randomStream } from '../../../lib/statistics/random.ts';
import { rankSum } from '../../../lib/statistics/rank-sum.ts';
import { averageRanks } from '../../../lib/statistics/ranks.ts';
import { regionalKendall } from '../../../lib/statistics/regional-kendall.ts';
import { pairwiseSlopes, senSlope } from '../../../lib/statistics/sen-slope.ts';
import { lag1OfRanks, shrinkLag1 } from '../../../lib/statistics/serial-correlation.ts';

const none = Number.NaN;
const yearsOf = (x: ArrayLike<number>) => Array.from(x, (_, i) => 2001 + i);

/** A function of one sample, made to give plain figures. */
interface Statistic {
  of: (x: readonly number[]) => number | number[];
  equal: number | number[];
  zero: number | number[];
  two: number | number[];
  missing: number | number[];
  /** text of the refusal of an infinite value */
  infinite: RegExp;
}

const figures = <T extends object>(result: T, keys: (keyof T)[]) => keys.map((key) => result[key] as number);

/** Samples: six times 3.1, six zeros, [1, 2], six times NaN, and an infinite value among six. */
const STATISTICS: Record<string, Statistic> = {
  mannKendall: {
    of: (x) => figures(mannKendall(x), ['n', 's', 'z', 'p', 'tauB']),
    equal: [6, 0, 0, 1, none],
    zero: [6, 0, 0, 1, none],
    // S 1, less the continuity correction
    two: [2, 1, 0, 1, 1],
    missing: [0, 0, none, none, none],
    infinite: /^mannKendall: x\[2\] must be a finite number or NaN, got Infinity$/,
  },
  senSlope: {
    of: (x) => figures(senSlope(yearsOf(x), x), ['slope', 'low', 'high', 'pairs']),
    equal: [0, 0, 0, 15],
    zero: [0, 0, 0, 15],
    two: [1, none, none, 1],
    missing: [none, none, none, 0],
    infinite: /^senSlope: x\[2\] must be a finite number or NaN, got Infinity$/,
  },
  pairwiseSlopes: {
    of: (x) => pairwiseSlopes(yearsOf(x), x).slope,
    equal: 0,
    zero: 0,
    two: 1,
    missing: none,
    infinite: /^senSlope: x\[2\] must be/,
  },
  pettitt: {
    of: (x) => figures(pettitt(x), ['k', 'at', 'p']),
    equal: [0, 0, 1],
    zero: [0, 0, 1],
    two: [1, 0, 1],
    missing: [none, -1, none],
    infinite: /^pettitt: x\[2\] must be/,
  },
  median: {
    of: (x) => median(x),
    equal: 3.1,
    zero: 0,
    two: 1.5,
    missing: none,
    infinite: /^median: x\[2\] must be/,
  },
  regionalKendall: {
    of: (x) => figures(regionalKendall([{ years: yearsOf(x), values: x }]), ['s', 'variance', 'z', 'p', 'tau']),
    equal: [0, 0, 0, 1, 0],
    zero: [0, 0, 0, 1, 0],
    two: [1, 1, 0, 1, 1],
    missing: [0, none, none, none, none],
    infinite: /^regionalKendall: values\[2\] of site 0 must be a finite number or NaN, got Infinity$/,
  },
  'rankSum against 1 … 6': {
    of: (x) => figures(rankSum(x, [1, 2, 3, 4, 5, 6]), ['before', 'u']),
    equal: [6, 18],
    zero: [6, 36],
    two: [2, 10],
    missing: [0, 0],
    infinite: /^rankSum: x\[2\] must be/,
  },
  'rankSum against itself': {
    of: (x) => figures(rankSum(x, x), ['z', 'p']),
    equal: [0, 1],
    zero: [0, 1],
    two: [0, 1],
    missing: [none, none],
    infinite: /^rankSum: x\[2\] must be/,
  },
  'hodgesLehmann against itself': {
    of: (x) => figures(hodgesLehmann(x, x), ['difference', 'low', 'high']),
    equal: [0, 0, 0],
    zero: [0, 0, 0],
    two: [0, none, none],
    missing: [none, none, none],
    infinite: /^hodgesLehmann: x\[2\] must be/,
  },
  blockBootstrapFactor: {
    of: (x) => blockBootstrapFactor(x, randomStream('bad input')),
    equal: 1,
    zero: 1,
    two: 1,
    missing: 1,
    infinite: /^blockBootstrapFactor: x\[2\] must be/,
  },
};

const EQUAL = [3.1, 3.1, 3.1, 3.1, 3.1, 3.1];
const ZERO = [0, 0, 0, 0, 0, 0];
const MISSING = [none, none, none, none, none, none];
const INFINITE = [1, 2, Number.POSITIVE_INFINITY, 4, 5, 6];

describe.each(Object.entries(STATISTICS))('%s', (_, { of, equal, zero, two, missing, infinite }) => {
  test('of equal values', () => expect(of(EQUAL)).toEqual(equal));
  test('of zeros', () => expect(of(ZERO)).toEqual(zero));
  test('of two values', () => expect(of([1, 2])).toEqual(two));
  test('of missing values alone', () => expect(of(MISSING)).toEqual(missing));
  test('of an infinite value is refused', () => {
    expect(() => of(INFINITE)).toThrow(RangeError);
    expect(() => of(INFINITE)).toThrow(infinite);
  });
});

/** Functions of dated values, of which none may be missing. */
const OF_DATED: Record<string, (x: readonly number[], slope: number) => number> = {
  lag1OfRanks: (x, slope) => lag1OfRanks({ years: yearsOf(x), values: x, slope }),
  significantLag1: (x, slope) => significantLag1({ years: yearsOf(x), values: x, slope }),
  allLagsVarianceFactor: (x, slope) => allLagsVarianceFactor({ years: yearsOf(x), values: x, slope }).factor,
  preWhitened: (x, slope) => preWhitened({ years: yearsOf(x), values: x, slope }, 0.5).values.length,
};

describe.each([
  ['lag1OfRanks', [none, none, none]],
  ['significantLag1', [none, none, none]],
  ['allLagsVarianceFactor', [1, 1, 1]],
  ['preWhitened', [5, 5, 1]],
])('%s', (name, [equal, zero, two]) => {
  const of = OF_DATED[name];
  test('of equal values', () => expect(of(EQUAL, 0)).toBe(equal));
  test('of zeros', () => expect(of(ZERO, 0)).toBe(zero));
  test('of two values', () => expect(of([1, 2], 1)).toBe(two));
  test('of a missing or an infinite value, or an infinite slope, is refused', () => {
    expect(() => of(MISSING, 0)).toThrow(new RangeError(`${name}: values[0] must be a finite number, got NaN`));
    expect(() => of(INFINITE, 0)).toThrow(new RangeError(`${name}: values[2] must be a finite number, got Infinity`));
    expect(() => of(EQUAL, Infinity)).toThrow(new RangeError(`${name}: slope must be a finite number, got Infinity`));
  });
});

test('averageRanks ranks infinite values like others, and gives equal and missing ones what they are due', () => {
  expect([...averageRanks(INFINITE)]).toEqual([1, 2, 6, 3, 4, 5]);
  expect([...averageRanks(EQUAL)]).toEqual([3.5, 3.5, 3.5, 3.5, 3.5, 3.5]);
  expect([...averageRanks(MISSING)]).toEqual(MISSING);
});

test('benjaminiHochberg of equal, zero and missing p; of what is no probability it is refused', () => {
  expect([...benjaminiHochberg([0.2, 0.2])]).toEqual([0.2, 0.2]);
  expect([...benjaminiHochberg([0, 0, 1])]).toEqual([0, 0, 1]);
  expect([...benjaminiHochberg(MISSING)]).toEqual(MISSING);
  expect(() => benjaminiHochberg([0.1, Infinity])).toThrow('benjaminiHochberg: p[1] must lie in 0..1, got Infinity');
});

test('shrinkLag1 of equal, missing and infinite correlations', () => {
  expect([...shrinkLag1(Float64Array.of(0.25, 0.25), [40, 40])]).toEqual([0.25, 0.25]);
  expect([...shrinkLag1(Float64Array.of(none, none), [40, 40])]).toEqual([none, none]);
  expect(() => shrinkLag1(Float64Array.of(0.25, -Infinity), [40, 40])).toThrow(
    'shrinkLag1: r[1] must be a finite number or NaN, got -Infinity',
  );
});
