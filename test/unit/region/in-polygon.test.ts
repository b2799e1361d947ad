import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { areaFromText, areaToText, type Corner, inPolygon, MOST_CORNERS } from '../../../lib/region/in-polygon.ts';

const at = (longitude: number | null, latitude: number | null) => ({ longitude, latitude });
const SQUARE: Corner[] = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
];

describe('inPolygon', () => {
  test('tells inside from outside, and counts edges and corners as inside', () => {
    expect(inPolygon(SQUARE, at(5, 5))).toBe(true);
    for (const outside of [at(-1, 5), at(11, 5), at(5, -1), at(5, 11), at(-1, 0), at(11, 10)]) {
      expect(inPolygon(SQUARE, outside)).toBe(false);
    }
    for (const edge of [at(0, 5), at(5, 0), at(10, 5), at(5, 10), at(0, 0), at(10, 10)]) {
      expect(inPolygon(SQUARE, edge)).toBe(true);
    }
  });

  test('leaves out the notch of an area that is not convex', () => {
    const notched: Corner[] = [
      [0, 0],
      [10, 0],
      [10, 10],
      [5, 2],
      [0, 10],
    ];
    expect(inPolygon(notched, at(5, 5))).toBe(false);
    expect(inPolygon(notched, at(1, 5))).toBe(true);
    expect(inPolygon(notched, at(9, 5))).toBe(true);
  });

  test('counts a ray through a corner once', () => {
    const diamond: Corner[] = [
      [0, -5],
      [5, 0],
      [0, 5],
      [-5, 0],
    ];
    expect(inPolygon(diamond, at(-1, 0))).toBe(true);
    expect(inPolygon(diamond, at(-6, 0))).toBe(false);
    expect(inPolygon(diamond, at(-6, 5))).toBe(false);
  });

  test('holds places on both sides of the date line', () => {
    const pacific: Corner[] = [
      [170, -50],
      [190, -50],
      [190, -30],
      [170, -30],
    ];
    expect(inPolygon(pacific, at(175, -40))).toBe(true);
    expect(inPolygon(pacific, at(-175, -40))).toBe(true);
    expect(inPolygon(pacific, at(-165, -40))).toBe(false);
  });

  test('holds no station whose place is not known', () => {
    expect(inPolygon(SQUARE, at(null, 5))).toBe(false);
    expect(inPolygon(SQUARE, at(5, null))).toBe(false);
  });

  test('refuses an area of two corners', () => {
    expect(() => inPolygon(SQUARE.slice(0, 2), at(1, 1))).toThrow(
      'inPolygon: area must have at least 3 corners, got 2',
    );
  });

  test('agrees with the distance from the centre for regular polygons', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 3, max: 60 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 2, noNaN: true }),
        (corners, turn, far) => {
          const ring = Array.from({ length: corners }, (_, i): Corner => {
            const angle = (2 * Math.PI * i) / corners;
            return [Math.cos(angle), Math.sin(angle)];
          });
          const angle = 2 * Math.PI * turn;
          const inner = Math.cos(Math.PI / corners);
          const found = inPolygon(ring, at(far * Math.cos(angle), far * Math.sin(angle)));
          if (far < inner - 1e-9) expect(found).toBe(true);
          if (far > 1 + 1e-9) expect(found).toBe(false);
        },
      ),
    );
  });
});

describe('areaFromText', () => {
  test('reads what areaToText wrote, to five decimals', () => {
    expect(
      areaToText([
        [7.5, 47],
        [8, 47],
        [-0.000001, 47.123456],
      ]),
    ).toBe('7.5,47;8,47;0,47.12346');
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: -360e5, max: 360e5 }), fc.integer({ min: -90e5, max: 90e5 })), {
          minLength: 3,
          maxLength: MOST_CORNERS,
        }),
        (corners) => {
          const area = corners.map(([x, y]): Corner => [x / 1e5, y / 1e5]);
          expect(areaFromText(areaToText(area))).toEqual({ area: area.map(([x, y]) => [x + 0, y + 0]) });
        },
      ),
    );
  });

  test('reads no more decimals than areaToText writes: areas of one text are one area', () => {
    const read = areaFromText('7.123456,50;8,50.0000049;8,51');
    expect(read).toEqual({
      area: [
        [7.12346, 50],
        [8, 50],
        [8, 51],
      ],
    });
  });

  test('says which corner cannot be read, and how many there may be', () => {
    expect(areaFromText('1,2;3,4')).toEqual({ problem: 'an area has 3 to 60 corners, this one has 2' });
    expect(areaFromText(new Array(61).fill('1,2').join(';'))).toEqual({
      problem: 'an area has 3 to 60 corners, this one has 61',
    });
    for (const bad of ['x,2', '1', '1,2,3', '361,0', '0,90.5', 'NaN,1', '1e2,3', '']) {
      expect(areaFromText(`1,2;${bad};5,6`)).toEqual({
        problem: `corner 2 of the area must be longitude,latitude in degrees, not "${bad}"`,
      });
    }
  });
});
