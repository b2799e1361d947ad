import fc from 'fast-check';
import { expect, test } from 'vitest';
import { withCorner, withCornerAt, withoutCorner } from '@/app/regions/[region]/evidence/_draw/edit-area';
import { frameMap, toCorner, toPixels } from '@/app/regions/[region]/evidence/_draw/map-frame';
import { type Corner, MOST_CORNERS } from '@/lib/region/in-polygon';

const place = fc.record({
  longitude: fc.double({ min: -179, max: 179, noNaN: true }),
  latitude: fc.double({ min: -80, max: 80, noNaN: true }),
});

test('frameMap: every station lies within the margin of the map', () => {
  fc.assert(
    fc.property(
      fc.array(place, { minLength: 1, maxLength: 30 }),
      fc.integer({ min: 200, max: 1200 }),
      (places, width) => {
        const frame = frameMap(places, width);
        if (!frame) return false;
        return places.every((one) => {
          const [x, y] = toPixels(frame, one);
          return x > 27.9 && x < width - 27.9 && y > 27.9 && y < frame.height - 27.9;
        });
      },
    ),
  );
});

test('frameMap: no station, no map; one station lies in the middle', () => {
  expect(frameMap([], 600)).toBeNull();
  const one = { longitude: 8.5, latitude: 47.4 };
  const frame = frameMap([one], 600);
  expect(frame?.height).toBe(220);
  const [x, y] = frame ? toPixels(frame, one) : [0, 0];
  expect(x).toBeCloseTo(300, 6);
  expect(y).toBeCloseTo(110, 6);
});

test('toCorner: the inverse of toPixels', () => {
  fc.assert(
    fc.property(place, place, (a, b) => {
      const frame = frameMap([a, b], 700);
      if (!frame) return false;
      const [longitude, latitude] = toCorner(frame, ...toPixels(frame, a));
      return Math.abs(longitude - a.longitude) < 1e-6 && Math.abs(latitude - a.latitude) < 1e-6;
    }),
  );
});

const SQUARE: Corner[] = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
];

test('withCorner: the first three follow one another, a later one goes into the edge it lies nearest', () => {
  expect(withCorner([], [1, 1])).toEqual({ area: [[1, 1]], at: 0 });
  expect(withCorner(SQUARE.slice(0, 2), [5, 5])).toEqual({ area: [...SQUARE.slice(0, 2), [5, 5]], at: 2 });
  expect(withCorner(SQUARE, [11, 5])).toEqual({
    area: [
      [0, 0],
      [10, 0],
      [11, 5],
      [10, 10],
      [0, 10],
    ],
    at: 2,
  });
  // the edge from the last corner back to the first
  expect(withCorner(SQUARE, [-1, 5]).at).toBe(4);
});

test('withCorner: takes no more corners than an address may hold', () => {
  const full = Array.from({ length: MOST_CORNERS }, (_, i): Corner => [i, i * i]);
  expect(withCorner(full, [3, 3]).area).toHaveLength(MOST_CORNERS);
});

test('withoutCorner and withCornerAt leave the others and their input alone', () => {
  const before = structuredClone(SQUARE);
  expect(withoutCorner(SQUARE, 1)).toEqual([
    [0, 0],
    [10, 10],
    [0, 10],
  ]);
  expect(withCornerAt(SQUARE, 1, [9, 1])[1]).toEqual([9, 1]);
  expect(SQUARE).toEqual(before);
});
