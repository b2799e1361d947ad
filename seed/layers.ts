import type { Feature, FeatureCollection, Position } from 'geojson';
import type { Drainage } from './drainage.ts';
import { CELL_KM2, type Point } from './hex-grid.ts';
import { outlineOf } from './outline.ts';
import { type River, riverPoints, smoothLine } from './rivers.ts';
import type { Site } from './sites.ts';

/** South-west corner of every invented region: open ocean in the middle of the North Atlantic, where no river is. */
const CORNER = { latitude: 36.2, longitude: -42.4 };
const KM_PER_DEGREE = 111.2;
const KM_PER_DEGREE_EAST = KM_PER_DEGREE * Math.cos(((CORNER.latitude + 0.8) * Math.PI) / 180);

/** Longitude and latitude of a point, to about 10 m. */
export function toDegrees([x, y]: Point): Position {
  const round = (degrees: number) => Math.round(degrees * 1e4) / 1e4;
  return [round(CORNER.longitude + x / KM_PER_DEGREE_EAST), round(CORNER.latitude + y / KM_PER_DEGREE)];
}

/** A map layer of an invented region. */
export interface SeedLayer {
  name: string;
  kind: 'river' | 'catchment' | 'other';
  geojson: FeatureCollection;
}

/** What the map shows of the land: the basin, every catchment that has an area, the rivers. */
export function drawLayers(
  drainage: Drainage,
  rivers: readonly River[],
  sites: readonly Site[],
  named: { riverNames: readonly string[]; stations: readonly { code: string; name: string; areaKm2: number | null }[] },
  leastRiverCells: number,
): SeedLayer[] {
  const { grid, order, downstream, upstreamCells } = drainage;
  const polygon = (ring: readonly Point[], properties: Feature['properties']): Feature => {
    const positions = ring.map(toDegrees);
    return { type: 'Feature', properties, geometry: { type: 'Polygon', coordinates: [[...positions, positions[0]]] } };
  };
  const basin = outlineOf(grid, order, (cell) => downstream[cell] !== -2);

  const points = riverPoints(drainage, rivers);
  const at = (cell: number): Point => points.get(cell) ?? grid.centre(cell);
  const lines = rivers.flatMap(({ cells }, i): Feature[] => {
    const size = upstreamCells[cells[Math.max(0, cells.length - 2)]];
    if (size < leastRiverCells) return [];
    // Headwater trickles below the size that is drawn are left out of longer rivers too.
    const first = cells.findIndex((cell) => upstreamCells[cell] >= leastRiverCells / 2);
    const course = cells.slice(Math.max(0, first));
    if (course.length < 2) return [];
    const properties = { name: named.riverNames[i] ?? '', areaKm2: Math.round(size * CELL_KM2) };
    const coordinates = smoothLine(course.map(at)).map(toDegrees);
    return [{ type: 'Feature', properties, geometry: { type: 'LineString', coordinates } }];
  });

  const collection = (features: Feature[]): FeatureCollection => ({ type: 'FeatureCollection', features });
  return [
    { name: 'Basin', kind: 'other', geojson: collection([polygon(basin, { name: 'Basin' })]) },
    { name: 'Catchments', kind: 'catchment', geojson: collection(catchments()) },
    { name: 'Rivers', kind: 'river', geojson: collection(lines) },
  ];

  function catchments(): Feature[] {
    // A cell belongs to its nearest site downstream; a catchment is what belongs to the site and to all above it.
    const siteAt = new Map(sites.map((site, i) => [site.cell, i]));
    const own: number[][] = sites.map(() => []);
    const owner = new Int32Array(grid.cells).fill(-1);
    for (const cell of order) {
      owner[cell] = siteAt.get(cell) ?? (downstream[cell] < 0 ? -1 : owner[downstream[cell]]);
      if (owner[cell] >= 0) own[owner[cell]].push(cell);
    }
    const whole = own;
    for (let i = sites.length - 1; i >= 0; i -= 1) {
      const below = sites[i].below;
      if (below >= 0) whole[below] = whole[below].concat(whole[i]);
    }
    const mark = new Int32Array(grid.cells).fill(-1);
    return sites.flatMap((_, i) => {
      const { code, name, areaKm2 } = named.stations[i];
      if (areaKm2 === null) return [];
      for (const cell of whole[i]) mark[cell] = i;
      return [
        polygon(
          outlineOf(grid, whole[i], (cell) => mark[cell] === i),
          { code, name, areaKm2 },
        ),
      ];
    });
  }
}
