import { expect, test } from 'vitest';
import { parseDegrees } from '../../../../lib/intake/registry/degrees.ts';

// A minute is a sixtieth of a degree, a second a sixtieth of a minute.
test.each([
  ['47.25', 47.25],
  ['-0.5', -0.5],
  ['−12', -12],
  ['+47.', 47],
  ['47°15′', 47.25],
  ['47° 15\' 00" N', 47.25],
  ['47°15′36″S', -47.26],
  ['S 47 15 36', -47.26],
  ['47:15:36', 47.26],
  ['47d15m36s', 47.26],
  ['-47 15 36', -47.26],
  ['47 15.6 N', 47.26],
  ['47.26N', 47.26],
  ['47.26° S', -47.26],
  ['0°30\'0"S', -0.5],
  ["47°15'36''N", 47.26],
])('parseDegrees(“%s”) is %d', (text, degrees) => {
  expect(parseDegrees(text, 'latitude', false)).toBe(degrees);
});

test('parseDegrees reads the letters of its axis alone, and decimal commas', () => {
  expect(parseDegrees('68°30′W', 'longitude', false)).toBe(-68.5);
  expect(parseDegrees('E 8.5', 'longitude', false)).toBe(8.5);
  expect(parseDegrees('68°30′W', 'latitude', false)).toBeNaN();
  expect(parseDegrees('47,25', 'latitude', true)).toBe(47.25);
  expect(parseDegrees('47°15,6′N', 'latitude', true)).toBe(47.26);
});

test.each([
  '',
  'north',
  '47°60′',
  '47°15\'60"',
  '8,5',
  '8°30′O',
  '-8°30′S',
  '47.5°30′',
  '47 15 36 12',
  '1e999x',
  'N',
  '47 N 15',
])('parseDegrees(“%s”) is NaN', (text) => {
  expect(parseDegrees(text, 'latitude', false)).toBeNaN();
});
