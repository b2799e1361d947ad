import { expect, test } from 'vitest';
import { type Box, clipRing, runsInside } from '@/app/map-outline/clip';

const box: Box = [0, 0, 10, 10];

test('clipRing cuts a square that reaches over a corner to its part inside', () => {
  const ring = clipRing(
    [
      [5, 5],
      [15, 5],
      [15, 15],
      [5, 15],
      [5, 5],
    ],
    box,
  );
  expect(area(ring)).toBe(25);
  expect(ring[0]).toEqual(ring[ring.length - 1]);
});

test('clipRing leaves a ring inside as it is and answers none for one outside', () => {
  const inside = [
    [1, 1],
    [2, 1],
    [2, 2],
    [1, 1],
  ];
  expect(area(clipRing(inside, box))).toBe(0.5);
  expect(
    clipRing(
      inside.map(([x, y]) => [x + 20, y]),
      box,
    ),
  ).toEqual([]);
});

test('clipRing of a ring about the box is the box', () => {
  const about = [
    [-5, -5],
    [15, -5],
    [15, 15],
    [-5, 15],
    [-5, -5],
  ];
  expect(area(clipRing(about, box))).toBe(100);
});

test('runsInside parts a line where it leaves the box', () => {
  const line = [
    [1, 1],
    [2, 2],
    [20, 20],
    [30, 20],
    [20, 5],
    [5, 5],
  ];
  expect(runsInside(line, box)).toEqual([
    [
      [1, 1],
      [2, 2],
      [20, 20],
    ],
    [
      [20, 5],
      [5, 5],
    ],
  ]);
});

/** Area of a ring by the shoelace formula. */
function area(ring: number[][]): number {
  let twice = 0;
  for (let i = 1; i < ring.length; i++) twice += ring[i - 1][0] * ring[i][1] - ring[i][0] * ring[i - 1][1];
  return Math.abs(twice) / 2;
}
