import { readFile } from 'node:fs/promises';
import path from 'node:path';
import type { FeatureCollection, MultiLineString, MultiPolygon, Position } from 'geojson';
import { feature, mesh } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { type Box, clipRing, runsInside } from './clip.ts';

interface Outline {
  land: Position[][][];
  borders: Position[][];
}

let loaded: Promise<Outline> | null = null;

/** Land and borders of Natural Earth at 1:10 million, from the installed package; read once. */
function readOutline(): Promise<Outline> {
  loaded ??= readFile(
    path.join(/* turbopackIgnore: true */ process.cwd(), 'node_modules/world-atlas/countries-10m.json'),
    'utf8',
  ).then((text) => {
    const atlas = JSON.parse(text) as Topology<{ land: GeometryCollection; countries: GeometryCollection }>;
    const land = feature(atlas, atlas.objects.land).features.flatMap(({ geometry }) =>
      geometry.type === 'MultiPolygon'
        ? geometry.coordinates
        : geometry.type === 'Polygon'
          ? [geometry.coordinates]
          : [],
    );
    return { land, borders: mesh(atlas, atlas.objects.countries).coordinates };
  });
  return loaded;
}

/** Land and borders inside a box: one feature each, told apart by `kind`. */
export async function outlineOf(box: Box): Promise<FeatureCollection<MultiPolygon | MultiLineString>> {
  const { land, borders } = await readOutline();
  const polygons = land
    .map((rings) => rings.map((ring) => clipRing(ring, box)))
    .filter(([outer]) => outer.length > 0)
    .map(([outer, ...holes]) => [outer, ...holes.filter((hole) => hole.length > 0)]);
  const lines = borders.flatMap((line) => runsInside(line, box));
  return {
    type: 'FeatureCollection',
    features: [
      {
        type: 'Feature',
        properties: { kind: 'land' },
        geometry: { type: 'MultiPolygon', coordinates: polygons },
      },
      { type: 'Feature', properties: { kind: 'border' }, geometry: { type: 'MultiLineString', coordinates: lines } },
    ],
  };
}
