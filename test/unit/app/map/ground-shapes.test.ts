import { expect, test } from 'vitest';
import { groundShapes } from '@/app/regions/[region]/_map/ground-shapes';

const all = (data: unknown) => [...groundShapes(data as Parameters<typeof groundShapes>[0])];

test('groundShapes projects to Web Mercator at zoom 0: the world is 256 wide and its middle at 128', () => {
  const [shape] = all({
    type: 'LineString',
    coordinates: [
      [-180, 0],
      [180, 0],
      [0, 85.0511287798],
    ],
  });
  expect([...shape.xy.slice(0, 4)]).toEqual([0, 128, 256, 128]);
  expect(shape.xy[5]).toBeCloseTo(0, 6);
  expect([shape.minX, shape.maxX]).toEqual([0, 256]);
});

test('groundShapes ends at the square world’s edge, for the poles are infinitely far', () => {
  const [shape] = all({
    type: 'MultiPoint',
    coordinates: [
      [0, 90],
      [0, -90],
    ],
  });
  expect(shape.point).toBe(true);
  expect(shape.xy[1]).toBeCloseTo(0, 6);
  expect(shape.xy[3]).toBeCloseTo(256, 6);
});

test('groundShapes gives each polygon of each feature its own shape, its rings one after another', () => {
  const ring = [
    [0, 0],
    [1, 0],
    [1, 1],
    [0, 0],
  ];
  const shapes = all({
    type: 'FeatureCollection',
    features: [
      {
        type: 'Feature',
        properties: { name: 'a' },
        geometry: { type: 'MultiPolygon', coordinates: [[ring, ring], [ring]] },
      },
      { type: 'Feature', properties: null, geometry: null },
      {
        type: 'Feature',
        properties: null,
        geometry: { type: 'GeometryCollection', geometries: [{ type: 'MultiLineString', coordinates: [ring, ring] }] },
      },
    ],
  });
  expect(shapes.map(({ area, starts }) => [area, starts])).toEqual([
    [true, [0, 8, 16]],
    [true, [0, 8]],
    [false, [0, 8, 16]],
  ]);
  expect(shapes[0].properties).toEqual({ name: 'a' });
});

test('groundShapes of an empty collection are none', () => {
  expect(all({ type: 'FeatureCollection', features: [] })).toEqual([]);
});
