import { expect, test } from 'vitest';
import { referenceCandidates, referencesToBeginWith } from '../../../lib/region/reference-candidates.ts';

type Row = Parameters<typeof referenceCandidates>[1][number];

const LEVELS = [3, 1, 4, 1.5, 5, 9, 2, 6, 5.3, 5.8, 9.7, 9.3];
const row = (code: string, latitude: number | null, values: number[], more: Partial<Row> = {}): Row => ({
  ...{ code, name: code, latitude, longitude: latitude === null ? null : 10, influence: 'natural', drying: false },
  years: values.map((_, i) => 2000 + i),
  values,
  ...more,
});
const codes = (rows: Row[]) => referenceCandidates('A', rows).map(({ code }) => code);

test('referenceCandidates puts those first whose figures go most with the station’s', () => {
  const rows = [
    row('A', 50, LEVELS),
    row('B', 50.1, [...LEVELS].reverse()),
    row(
      'C',
      51,
      LEVELS.map((value) => value ** 2),
    ),
    row(
      'D',
      null,
      LEVELS.map((value, i) => value + 3 * (i % 2)),
    ),
  ];
  const found = referenceCandidates('A', rows);
  expect(found.map(({ code }) => code)).toEqual(['C', 'D', 'B']);
  expect(found[0]).toMatchObject({ commonYears: 12, correlation: 1 });
  // a degree of latitude is 111.2 km
  expect(found[0].km).toBeCloseTo(111.2, 1);
  expect(found[1].km).toBeNull();
});

test('referenceCandidates takes natural stations only, never derived ones, those under Drying or the station itself', () => {
  const others = [
    row('B', 50, LEVELS, { influence: 'regulated' }),
    row('C', 50, LEVELS, { influence: 'unknown' }),
    row('D', 50, LEVELS, { derivedFrom: 'A + P' }),
    row('E', 50, LEVELS, { drying: true }),
  ];
  expect(codes([row('A', 50, LEVELS), ...others])).toEqual([]);
  expect(codes([row('A', 50, LEVELS, { influence: 'abstracted' }), ...others, row('F', 50, LEVELS)])).toEqual(['F']);
});

test('referenceCandidates asks for ten common years', () => {
  const here = row('A', 50, LEVELS);
  expect(codes([here, row('B', 50, LEVELS.slice(0, 9))])).toEqual([]);
  expect(codes([here, row('B', 50, LEVELS.slice(0, 10))])).toEqual(['B']);
});

test('referenceCandidates looks at the nearest thirty, and breaks ties by distance, then by code', () => {
  const many = Array.from({ length: 40 }, (_, i) => row(`N${String(i).padStart(2, '0')}`, 50 + (40 - i) / 100, LEVELS));
  const found = codes([row('A', 50, LEVELS), ...many]);
  expect(found.length).toBe(30);
  expect(found[0]).toBe('N39');
  expect(found.at(-1)).toBe('N10');
  expect(codes([row('A', null, LEVELS), row('C', 1, LEVELS), row('B', 2, LEVELS)])).toEqual(['B', 'C']);
});

test('referenceCandidates has no correlation where one does not vary, and puts it last', () => {
  const flat = row(
    'B',
    50,
    LEVELS.map(() => 4),
  );
  expect(referenceCandidates('A', [row('A', 50, LEVELS), flat, row('C', 60, [...LEVELS].reverse())])).toMatchObject([
    { code: 'C' },
    { code: 'B', correlation: null },
  ]);
});

test('referenceCandidates of an unknown code are none', () => {
  expect(referenceCandidates('Z', [row('A', 50, LEVELS)])).toEqual([]);
});

test('referenceCandidates asks for half of the years that the station has', () => {
  const long = Array.from({ length: 30 }, (_, i) => LEVELS[i % 12] + i);
  const here = row('A', 50, long);
  expect(codes([here, row('B', 50, long.slice(0, 14))])).toEqual([]);
  expect(codes([here, row('B', 50, long.slice(0, 15))])).toEqual(['B']);
});

test('referencesToBeginWith takes the best three that share four fifths of the years, else the one that shares most', () => {
  const candidate = (code: string, commonYears: number) => ({ code, name: code, km: 1, commonYears, correlation: 0.9 });
  const found = [candidate('A', 12), candidate('B', 39), candidate('C', 32), candidate('D', 31), candidate('E', 40)];
  expect(referencesToBeginWith(found, 40)).toEqual(['B', 'C', 'E']);
  expect(referencesToBeginWith([...found, candidate('F', 40)], 40)).toEqual(['B', 'C', 'E']);
  expect(referencesToBeginWith([candidate('A', 12), candidate('B', 20)], 40)).toEqual(['B']);
  expect(referencesToBeginWith([], 40)).toEqual([]);
});
