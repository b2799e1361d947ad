import fc from 'fast-check';
import { expect, test } from 'vitest';
import { BASIS_KEYS, type BasisKey, DEFAULT_BASIS, parseBasis } from '../../lib/basis.ts';
import { resultKey, type StationInput } from '../../lib/jobs/result-key.ts';

const keys: BasisKey[] = ['days', 'exclude', 'season'];

const station = fc.record({
  facts: fc.record({
    id: fc.integer({ min: 1, max: 5 }),
    code: fc.constantFrom('A', 'B', 'C'),
    name: fc.constantFrom('', 'Alder', 'Birch'),
    river: fc.constantFrom('', 'Wethe'),
    latitude: fc.constantFrom(null, 50, 51),
    longitude: fc.constantFrom(null, 7),
    areaKm2: fc.constantFrom(null, 10, 20),
    influence: fc.constantFrom('natural' as const, 'regulated' as const),
  }),
  dataHash: fc.constantFrom(null, 'h1', 'h2'),
});
const region = fc.uniqueArray(station, { selector: ({ facts }) => facts.code, maxLength: 3 });
const basis = fc
  .record({
    days: fc.constantFrom(1, 7, 30),
    alpha: fc.constantFrom(0.05, 0.1),
    exclude: fc.constantFrom([], ['ice'] as const),
  })
  .map((input) => parseBasis(input));

const key = (values: ReturnType<typeof parseBasis>, stations: StationInput[], facts: 'all' | 'none' = 'all') =>
  resultKey('test', { values, keys }, stations, facts);
const read = (values: ReturnType<typeof parseBasis>) => JSON.stringify(keys.map((name) => values[name]));
const sorted = (stations: StationInput[]) =>
  JSON.stringify([...stations].sort((a, b) => (a.facts.code < b.facts.code ? -1 : 1)));

test('resultKey differs when, and only when, a basis key that is read, a record or a fact differs', () => {
  fc.assert(
    fc.property(basis, region, basis, region, (basisA, a, basisB, b) => {
      const equalInputs = read(basisA) === read(basisB) && sorted(a) === sorted(b);
      expect(key(basisA, a) === key(basisB, b)).toBe(equalInputs);
    }),
  );
});

test('resultKey does not depend on the order of the stations', () => {
  fc.assert(
    fc.property(basis, region, (values, stations) => {
      expect(key(values, [...stations].reverse())).toBe(key(values, stations));
    }),
  );
});

test('resultKey tells a derived station by its recipe, and leaves a measured one as it was', () => {
  fc.assert(
    fc.property(basis, region, (values, stations) => {
      if (stations.length === 0) return;
      const derived = (text?: string) =>
        key(
          values,
          stations.map(({ facts, dataHash }) => ({ facts: { ...facts, derivedFrom: text }, dataHash })),
        );
      expect(derived(undefined)).toBe(key(values, stations));
      expect(new Set([derived(undefined), derived('flow: A + B'), derived('flow: A − B')]).size).toBe(3);
    }),
  );
});

test('resultKey without facts changes with records only', () => {
  fc.assert(
    fc.property(basis, region, fc.string(), (values, stations, name) => {
      const renamed = stations.map(({ facts, dataHash }) => ({ facts: { ...facts, name, areaKm2: 77 }, dataHash }));
      expect(key(values, renamed, 'none')).toBe(key(values, stations, 'none'));
      if (stations.length === 0) return;
      const revised = stations.map((one, i) => (i === 0 ? { ...one, dataHash: 'h3' } : one));
      expect(key(values, revised, 'none')).not.toBe(key(values, stations, 'none'));
    }),
  );
});

test('resultKey tells analyses apart', () => {
  const keysOf = (analysis: string) => resultKey(analysis, { values: DEFAULT_BASIS, keys: BASIS_KEYS }, []);
  expect(keysOf('ranking')).not.toBe(keysOf('minima'));
  expect(keysOf('ranking')).toMatch(/^[0-9a-f]{64}$/);
});
