import { expect, test } from 'vitest';
import { SORTS, sortStations, spanOf } from '@/app/regions/[region]/records/_chart/sort-stations';
import { stationOf } from './records-builder.ts';

const stations = [
  stationOf('K10', [365, 365, 0, 365], { river: 'Wethe', areaKm2: 50, name: 'Obir' }),
  stationOf('K2', [365, 100], { river: 'Ámla', areaKm2: 400, name: 'Česma' }),
  stationOf('K1', [], { river: '', name: 'Never gauged' }),
  stationOf('K3', [0, 365, 365, 0], { river: 'Wethe', areaKm2: 900, name: 'Lom' }),
  stationOf('K4', [200, 365, 365], { river: 'Wethe', name: 'Spring' }),
];
const codes = (sort: (typeof SORTS)[number], reverse = false, search = '') =>
  sortStations(stations, { sort, reverse, search }).map(({ station }) => station.code);

test('spanOf counts from the first year with a value to the last', () => {
  expect(spanOf(stations[0])).toEqual({ first: 2000, last: 2003, years: 3, counting: 3, complete: 3 / 4 });
  expect(spanOf(stations[3])).toEqual({ first: 2001, last: 2002, years: 2, counting: 2, complete: 1 });
  expect(spanOf(stations[2])).toEqual({ first: null, last: null, years: 0, counting: 0, complete: null });
  expect(spanOf(stationOf('x', [0, 0]))).toMatchObject({ first: null, last: null, years: 0, complete: null });
});

test.each([
  ['river', ['K2', 'K3', 'K10', 'K4', 'K1']],
  ['area', ['K3', 'K2', 'K10', 'K1', 'K4']],
  ['length', ['K10', 'K4', 'K3', 'K2', 'K1']],
  ['end', ['K10', 'K4', 'K3', 'K2', 'K1']],
  ['complete', ['K3', 'K10', 'K4', 'K2', 'K1']],
  ['code', ['K1', 'K2', 'K3', 'K4', 'K10']],
  ['name', ['K2', 'K3', 'K1', 'K10', 'K4']],
] as const)('by %s', (sort, order) => expect(codes(sort)).toEqual(order));

test('in reverse, those without the figure still stand last', () => {
  expect(codes('area', true)).toEqual(['K10', 'K2', 'K3', 'K1', 'K4']);
  expect(codes('end', true)).toEqual(['K2', 'K3', 'K4', 'K10', 'K1']);
});

test('a search needs every word in code, name or river, marks and capitals aside', () => {
  expect(codes('code', false, 'cesma')).toEqual(['K2']);
  expect(codes('code', false, 'WETHE lom')).toEqual(['K3']);
  expect(codes('code', false, 'nothing')).toEqual([]);
});

test('every sort keeps every station, and leaves its input as it was', () => {
  const before = stations.map(({ code }) => code);
  for (const sort of SORTS) expect(codes(sort).sort()).toEqual([...before].sort());
  expect(stations.map(({ code }) => code)).toEqual(before);
});
