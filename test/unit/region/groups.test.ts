import { expect, test } from 'vitest';
import { groupsOf } from '../../../lib/region/groups.ts';
import { rankedRow } from './region-fixtures.ts';

const rows = [
  rankedRow({ code: 'A', influence: 'regulated', longitude: 1, latitude: 1 }),
  rankedRow({ code: 'B', influence: 'natural', longitude: 5, latitude: 5 }),
  rankedRow({ code: 'C', influence: 'natural', longitude: null, latitude: null }),
];
const codes = (area: Parameters<typeof groupsOf>[1]) =>
  groupsOf(rows, area).map(({ id, rows }) => [id, rows.map(({ code }) => code).join('')]);

test('groupsOf gives all, the influences that there are in their order, and what was drawn', () => {
  expect(codes(null)).toEqual([
    ['all', 'ABC'],
    ['influence:natural', 'BC'],
    ['influence:regulated', 'A'],
  ]);
  const square = [
    [0, 0],
    [2, 0],
    [2, 2],
    [0, 2],
  ] as const;
  expect(codes(square).at(-1)).toEqual(['drawn', 'A']);
});

test('groupsOf answers a region without ranked stations, and an area without any', () => {
  expect(groupsOf([], null).map(({ id }) => id)).toEqual(['all']);
  expect(
    codes([
      [50, 50],
      [51, 50],
      [51, 51],
    ]).at(-1),
  ).toEqual(['drawn', '']);
});
