import { expect, test } from 'vitest';
import { placeLabels } from '@/app/regions/[region]/stations/[code]/_breaks/break-labels';

test('placeLabels keeps words to the right of their lines in one row while there is room', () => {
  expect(placeLabels([100, 200], 80, 500)).toEqual([
    { x: 105, textAnchor: 'start', row: 0 },
    { x: 205, textAnchor: 'start', row: 0 },
  ]);
});

test('placeLabels puts words that would meet a row lower, and comes back up when there is room again', () => {
  expect(placeLabels([100, 140, 300], 80, 500).map(({ row }) => row)).toEqual([0, 1, 0]);
});

test('placeLabels puts words to the left of a line at the end of the figure', () => {
  expect(placeLabels([450], 80, 500)).toEqual([{ x: 445, textAnchor: 'end', row: 0 }]);
});

test('placeLabels has nothing to place without lines', () => {
  expect(placeLabels([], 80, 500)).toEqual([]);
});
