import { expect, test } from 'vitest';
import { readLayer } from '../../../lib/intake/read-layer.ts';
import { IntakeError, type LayerFile } from '../../../lib/intake/types.ts';
import { withFile } from './reading.ts';

const read = (content: unknown): Promise<LayerFile> =>
  withFile(typeof content === 'string' ? content : JSON.stringify(content), (path) =>
    readLayer(path, 'rivers.geojson'),
  );

const feature = (type: string, coordinates: unknown) => ({
  type: 'Feature',
  properties: {},
  geometry: { type, coordinates },
});
const layer = (...features: unknown[]) => ({ type: 'FeatureCollection', features });
const line = feature('LineString', [
  [-68.5, 47.25],
  [-68, 48],
]);
const ring = [
  [10, 45],
  [11, 45],
  [11, 46],
  [10, 45],
];

test('readLayer takes lines for rivers, polygons for catchments, a mixture for neither', async () => {
  const rivers = await read(
    layer(
      line,
      feature('MultiLineString', [
        [
          [1, 2],
          [3, 4],
        ],
      ]),
    ),
  );
  expect(rivers).toMatchObject({ name: 'rivers', kind: 'river', features: 2, bounds: [-68.5, 2, 3, 48], warnings: [] });
  expect(JSON.parse(rivers.geojson)).toEqual(
    layer(
      line,
      feature('MultiLineString', [
        [
          [1, 2],
          [3, 4],
        ],
      ]),
    ),
  );
  expect((await read(layer(feature('Polygon', [ring])))).kind).toBe('catchment');
  expect((await read(layer(feature('MultiPolygon', [[ring]]), line))).kind).toBe('other');
});

test('readLayer makes a collection of a single Feature, and counts features without a shape', async () => {
  expect(JSON.parse((await read(line)).geojson)).toEqual(layer(line));
  const { warnings } = await read(layer(line, { type: 'Feature', properties: {}, geometry: null }));
  expect(warnings).toEqual(['1 features have no shape and are not drawn.']);
});

test.each([
  ['an empty file', '', /empty/],
  ['text that is no JSON', 'id,name\n', /not valid JSON/],
  ['JSON that was cut', JSON.stringify(layer(line)).slice(0, -20), /cut|not valid JSON/],
  ['JSON of another kind', { type: 'Topology' }, /not a GeoJSON FeatureCollection/],
  ['a list', [1], /not a GeoJSON FeatureCollection/],
  ['no features', layer(), /no features/],
  ['only features without a shape', layer({ type: 'Feature', geometry: null }), /none of its features has a shape/],
  ['points', layer(line, feature('Point', [1, 2])), /feature 2 is neither a line nor a polygon/],
  ['something that is no feature', layer(7), /feature 1 is not a GeoJSON Feature/],
  [
    'projected coordinates',
    layer(feature('LineString', [[512345, 5212345]])),
    /feature 1 has a position that is no longitude/,
  ],
  ['latitude first, beyond 90', layer(feature('LineString', [[47, -168]])), /feature 1 has a position/],
  ['positions that are none', layer(feature('LineString', [['a', 'b']])), /feature 1 has a position/],
  ['lists nested too little', layer(feature('Polygon', [[1, 2]])), /feature 1 has no list of positions/],
])('readLayer refuses %s', async (_, content, message) => {
  const outcome = await read(content).catch((error: unknown) => error);
  expect(outcome).toBeInstanceOf(IntakeError);
  expect((outcome as IntakeError).problem.message).toMatch(message);
  expect((outcome as IntakeError).message).toMatch(/^rivers\.geojson/);
  expect((outcome as IntakeError).problem.remedy.length).toBeGreaterThan(10);
});
