import fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  BASIS_KEYS,
  type Basis,
  basisFromQuery,
  basisHash,
  basisSentence,
  basisToQuery,
  EXCLUDABLE_FLAGS,
  INDICES,
  parseBasis,
  SERIAL_CORRECTIONS,
  seasonProblem,
} from '../../lib/basis.ts';

const month = fc.integer({ min: 1, max: 12 });
/** A period has at most 500 years. */
const years = fc
  .tuple(fc.integer({ min: 1000, max: 9999 }), fc.integer({ min: 1, max: 500 }))
  .map(([first, length]): [number, number] => [first, Math.min(9999, first + length - 1)]);
/** JSON knows no −0. */
const share = (min: number, max: number) => fc.double({ min, max, noNaN: true }).map((value) => value + 0);
const basis: fc.Arbitrary<Basis> = fc
  .record({
    period: fc.oneof(fc.constant('common' as const), fc.constant(null), years),
    yearStart: fc.oneof(fc.constant('auto' as const), month),
    season: fc.option(fc.tuple(month, month)),
    days: fc.integer({ min: 1, max: 365 }),
    maxMissingDays: fc.integer({ min: 0, max: 365 }),
    exclude: fc.subarray([...EXCLUDABLE_FLAGS]),
    minYears: fc.integer({ min: 3, max: 1000 }),
    minCoverage: share(0, 1),
    normalise: fc.constantFrom('area', 'mean', 'median', 'none'),
    rankBy: fc.constantFrom('percent-per-decade', 'specific-change', 'kendall-tau'),
    trendTest: fc.constant('mann-kendall'),
    serialCorrection: fc.constantFrom(...SERIAL_CORRECTIONS),
    alpha: share(0.001, 0.5),
    units: fc.constantFrom('metric', 'us'),
    index: fc.constantFrom(...INDICES),
  })
  .filter(({ season, yearStart }) => seasonProblem(season, yearStart) === null)
  .map((keys) => parseBasis(keys));

test('a basis goes through a link and comes back, whatever the base', () => {
  fc.assert(
    fc.property(basis, basis, (given, base) => {
      const link = basisToQuery(given, base).toString();
      expect(basisFromQuery(new URLSearchParams(link), base)).toEqual(given);
      expect(basisFromQuery(Object.fromEntries(new URLSearchParams(link)), base)).toEqual(given);
    }),
  );
});

test('a basis goes through JSON and comes back', () => {
  fc.assert(
    fc.property(basis, basis, (given, base) => {
      expect(parseBasis(JSON.parse(JSON.stringify(given)), base)).toEqual(given);
    }),
  );
});

test('a link holds just the keys that differ', () => {
  fc.assert(
    fc.property(basis, basis, (given, base) => {
      const differing = BASIS_KEYS.filter((key) => JSON.stringify(given[key]) !== JSON.stringify(base[key]));
      expect([...basisToQuery(given, base).keys()]).toEqual(differing);
    }),
  );
});

test('basisHash is equal just when every key is', () => {
  fc.assert(
    fc.property(basis, basis, (a, b) => {
      expect(basisHash(a)).toBe(basisHash(structuredClone(a)));
      expect(basisHash(a) === basisHash(b)).toBe(JSON.stringify(a) === JSON.stringify(b));
    }),
  );
});

test('unknown keys are refused, each by its name', () => {
  const unknown = fc.string({ minLength: 1 }).filter((key) => !(BASIS_KEYS as string[]).includes(key));
  fc.assert(
    fc.property(basis, unknown, fc.jsonValue(), (given, key, value) => {
      const withUnknown = Object.fromEntries([...Object.entries(given), [key, value]]);
      expect(() => parseBasis(withUnknown)).toThrow(`"${key}"`);
    }),
  );
});

test('whatever stands in a link, the answer is a basis or a refusal that names a key', () => {
  const key = fc.constantFrom(...BASIS_KEYS);
  fc.assert(
    fc.property(fc.array(fc.tuple(key, fc.string())), (pairs) => {
      const query = new URLSearchParams(pairs);
      try {
        expect(parseBasis(basisFromQuery(query))).toEqual(basisFromQuery(query));
      } catch (error) {
        expect((error as Error).name).toBe('BasisError');
        expect((error as Error).message).toMatch(/^Basis key "[a-zA-Z]+" cannot be /);
      }
    }),
  );
});

test('basisSentence is one sentence, and two bases that rank otherwise never read the same', () => {
  const resolved = basis
    .filter(({ yearStart }) => yearStart !== 'auto')
    .map((given) => ({
      ...given,
      period: given.period === 'common' ? ([1985, 2024] as [number, number]) : given.period,
      yearStart: given.yearStart as number,
      // to four decimals of a per cent, as the sentence says them
      minCoverage: Math.round(given.minCoverage * 1e6) / 1e6,
      alpha: Math.round(given.alpha * 1e6) / 1e6,
      asked: { period: given.period, yearStart: given.yearStart },
    }));
  fc.assert(
    fc.property(resolved, fc.constantFrom(...BASIS_KEYS), resolved, (one, key, two) => {
      const other = { ...one, [key]: two[key], asked: { ...one.asked, [key]: two[key] } };
      const sentence = basisSentence(one);
      expect(sentence).toMatch(/^Comparing .*[^.]\.$/);
      expect(sentence).not.toMatch(/undefined|NaN|null|\[object/);
      if (key === 'units' || key === 'trendTest' || JSON.stringify(one[key]) === JSON.stringify(other[key])) return;
      // dates and days are ranked in days per decade under both
      const inDays = one.index === 'minimum-date' || one.index === 'zero-flow-days';
      if (key === 'rankBy' && inDays && ![one.rankBy, two.rankBy].includes('kendall-tau')) return;
      expect(basisSentence(other)).not.toBe(sentence);
    }),
  );
});
