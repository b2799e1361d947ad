import { expect, test } from 'vitest';
import { type Narrowing, narrowTo } from '../../../lib/export/narrow.ts';

const stations = [
  { code: 'A', latitude: 10, longitude: 20 },
  { code: 'B', latitude: -17, longitude: 179 },
  { code: 'C', latitude: -17, longitude: -179 },
  { code: 'D', latitude: null, longitude: null },
];
const codes = (narrowing: Narrowing) => narrowTo(stations, narrowing, (one) => one).map(({ code }) => code);

test('narrowTo nothing keeps all', () => {
  expect(codes({})).toEqual(['A', 'B', 'C', 'D']);
});

test('narrowTo codes keeps those named in the order of the rows; to no codes, none', () => {
  expect(codes({ codes: ['D', 'A', 'unknown'] })).toEqual(['A', 'D']);
  expect(codes({ codes: [] })).toEqual([]);
});

test('narrowTo bounds keeps stations on their edge and leaves out those without a place', () => {
  expect(codes({ bounds: { west: 20, south: 10, east: 20, north: 10 } })).toEqual(['A']);
  expect(codes({ bounds: { west: 20.001, south: 10, east: 21, north: 11 } })).toEqual([]);
});

test('narrowTo bounds with west above east runs over the date line', () => {
  expect(codes({ bounds: { west: 170, south: -20, east: -170, north: 0 } })).toEqual(['B', 'C']);
});

test('narrowTo codes and bounds keeps what is in both', () => {
  expect(codes({ codes: ['A', 'B'], bounds: { west: 170, south: -20, east: -170, north: 0 } })).toEqual(['B']);
});
