import { expect, test } from 'vitest';
import { rollingMean } from '../../../lib/series/moving-average.ts';

const NA = Number.NaN;
const mean = (flow: number[], days: number) => [...rollingMean(Float64Array.from(flow), days)];

test.each([
  ['two days', [3, 1, 2], 2, [NA, 2, 1.5]],
  ['one day is the flow itself', [3, 1, 2], 1, [3, 1, 2]],
  ['a window as long as the record', [3, 1, 2], 3, [NA, NA, 2]],
  ['a window longer than the record', [3, 1, 2], 4, [NA, NA, NA]],
  ['no days at all', [], 2, []],
  ['a gap at the start', [NA, 1, 3, 5], 2, [NA, NA, 2, 4]],
  ['a gap in the middle', [1, 3, NA, 5, 7, 9], 2, [NA, 2, NA, NA, 6, 8]],
  ['a gap at the end', [1, 3, 5, NA], 2, [NA, 2, 4, NA]],
  ['all missing', [NA, NA, NA], 2, [NA, NA, NA]],
  ['all zero', [0, 0, 0], 2, [NA, 0, 0]],
  ['windows over several blocks', [1, 2, 3, 4, 5, 6, 7, 8], 3, [NA, NA, 2, 3, 4, 5, 6, 7]],
])('rollingMean: %s', (_, flow, days, expected) => {
  expect(mean(flow, days)).toEqual(expected);
});

test.each([2, 7, 30, 90, 365])('rollingMean, %i days: dry windows after a wet one average exactly 0', (days) => {
  const wet = Array.from({ length: days + 3 }, (_, i) => 1e7 / 3 + 0.1 * i);
  const means = mean([...wet, ...new Array(2 * days).fill(0)], days);
  expect(means.slice(wet.length + days - 1)).toEqual(new Array(days + 1).fill(0));
});

test('rollingMean leaves its input as it was', () => {
  const flow = Float64Array.from([3, NA, 2, 5, 1]);
  const copy = flow.slice();
  rollingMean(flow, 2);
  expect(flow).toEqual(copy);
});

test.each([0, -1, 1.5, NA])('rollingMean refuses %d days', (days) => {
  expect(() => mean([1, 2], days)).toThrow(`rollingMean: days must be a whole number of at least 1, got ${days}`);
});
