import { expect, test } from 'vitest';
import { byCode, placesOf } from '../../../lib/region/places.ts';

const listed = (...candidates: [string, number | null][]) => {
  const given = candidates.map(([code, figure]) => ({ code, figure }));
  const { order, place } = placesOf(given);
  return order.map((i) => `${place[i]} ${given[i].code}`);
};

test('placesOf puts the smallest figure first', () => {
  expect(listed(['a', 5], ['b', -7], ['c', 0])).toEqual(['1 b', '2 c', '3 a']);
});

test('placesOf gives equal figures the better place, 1, 2, 2, 4, listed by code', () => {
  expect(listed(['d', 9], ['c', -1], ['b', -1], ['a', -5])).toEqual(['1 a', '2 b', '2 c', '4 d']);
});

test('placesOf takes figures for equal that differ in the last bit only', () => {
  expect(listed(['b', 0.3], ['a', 0.1 + 0.2], ['c', 0.3000001])).toEqual(['1 a', '1 b', '3 c']);
});

test('placesOf puts candidates without a figure after all that have one, sharing the place', () => {
  expect(listed(['a', null], ['c', 3], ['b', null])).toEqual(['1 c', '2 a', '2 b']);
  expect(listed(['b', null], ['a', null])).toEqual(['1 a', '1 b']);
});

test('placesOf takes −0 and 0 for equal, and nothing for nothing', () => {
  expect(listed(['b', -0], ['a', 0])).toEqual(['1 a', '1 b']);
  expect(listed()).toEqual([]);
});

test('byCode goes by characters, not by any language', () => {
  expect(['b', 'B', 'a', '10', '9', 'ä'].sort(byCode)).toEqual(['10', '9', 'B', 'a', 'b', 'ä']);
});
