import { expect, test } from 'vitest';
import { type NamedSlice, piecesOf, placesOfSlices, sliceFrom, slicesOf } from '@/app/components/import/slices';
import { FIXED_WIDTH } from '../../../fixed-width.ts';

test('slicesOf names the slices of a mapping, and placesOfSlices is its inverse', () => {
  const slices = slicesOf(FIXED_WIDTH);
  expect(slices).toEqual([
    { name: 'year', slice: [0, 4] },
    { name: 'month', slice: [4, 6] },
    { name: 'day', slice: [6, 8] },
    { name: 'value', slice: [28, 38] },
    { name: 'flag', slice: null },
  ]);
  const { layout, date, value, flag } = FIXED_WIDTH;
  expect(placesOfSlices(slices, FIXED_WIDTH)).toEqual({ layout, date, value, flag });
});

test('slicesOf of a whole date, and of a file of which nothing is known', () => {
  const whole = { ...FIXED_WIDTH, date: { columns: [[0, 10] as [number, number]], order: 'dmy' as const } };
  expect(slicesOf(whole).map(({ name }) => name)).toEqual(['date', 'value', 'flag']);
  const nothing = slicesOf({ ...FIXED_WIDTH, date: { columns: [], order: 'ymd' }, value: null });
  expect(nothing.every(({ slice }) => slice === null)).toBe(true);
  expect(placesOfSlices(nothing, FIXED_WIDTH)).toBeNull();
});

test.each([
  ['29', '38', [28, 38]],
  ['1', '1', [0, 1]],
  ['0', '4', null],
  ['5', '4', null],
  ['1.5', '4', null],
  ['', '4', null],
])('sliceFrom(%j, %j) → %j: people count from 1 and name the last character', (first, last, slice) => {
  expect(sliceFrom(first, last)).toEqual(slice);
});

test('piecesOf cuts a line at its slices, and loses and doubles no character', () => {
  const slices: NamedSlice[] = [
    { name: 'value', slice: [6, 99] },
    { name: 'year', slice: [0, 4] },
    { name: 'month', slice: [3, 5] },
  ];
  const pieces = piecesOf('20010x 1.25', slices);
  expect(pieces.map(({ text, name }) => [text, name])).toEqual([
    ['2001', 'year'],
    ['0', 'month'],
    ['x', null],
    [' 1.25', 'value'],
  ]);
  expect(pieces.map(({ text }) => text).join('')).toBe('20010x 1.25');
});
