import type { Feature, LineString, Polygon, Position } from 'geojson';
import { expect, test } from 'vitest';
import { layDrainage } from '../../../seed/drainage.ts';
import { DEMO_SEED, generateRegion } from '../../../seed/generate.ts';
import { traceRivers } from '../../../seed/rivers.ts';
import { chooseSites } from '../../../seed/sites.ts';

const region = generateRegion({ seed: DEMO_SEED });
const layers = region.layers();
const featuresOf = (kind: string) => layers.find((layer) => layer.kind === kind)!.geojson.features;

/** Even–odd rule. */
function holds({ geometry }: Feature, [x, y]: Position): boolean {
  const ring = (geometry as Polygon).coordinates[0];
  let inside = false;
  for (let i = 0; i + 1 < ring.length; i += 1) {
    const [[x0, y0], [x1, y1]] = [ring[i], ring[i + 1]];
    if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) inside = !inside;
  }
  return inside;
}

/** Area in degrees², positive when counter-clockwise. */
const signedArea = (ring: Position[]) =>
  ring.slice(1).reduce((sum, [x, y], i) => sum + (ring[i][0] * y - x * ring[i][1]) / 2, 0);

test('layDrainage: every cell of the basin drains to the mouth', () => {
  const { grid, downstream, order, upstreamCells, mouth } = layDrainage(5, 3000);
  expect(order[0]).toBe(mouth);
  expect(upstreamCells[mouth]).toBe(order.length);
  const seen = new Set<number>();
  for (const cell of order) {
    if (cell !== mouth) expect(seen.has(downstream[cell])).toBe(true);
    seen.add(cell);
  }
  expect(seen.size).toBeGreaterThan(grid.cells / 4);
});

test('chooseSites: catchments are nested, and own cells add up to the whole', () => {
  const drainage = layDrainage(5, 3000);
  const { riverOf } = traceRivers(drainage, 12);
  const sites = chooseSites(5, drainage, riverOf, 20);
  expect(sites).toHaveLength(20);
  const total = sites.map(({ ownCells }) => ownCells);
  for (let i = sites.length - 1; i >= 0; i -= 1) {
    expect(total[i]).toBe(sites[i].cells);
    if (sites[i].below >= 0) {
      expect(sites[i].below).toBeLessThan(i);
      total[sites[i].below] += total[i];
    }
  }
});

test('catchments and basin are closed rings, counter-clockwise, about as large as they say', () => {
  for (const feature of [...featuresOf('catchment'), ...featuresOf('other')]) {
    const [ring] = (feature.geometry as Polygon).coordinates;
    expect(ring[0]).toEqual(ring[ring.length - 1]);
    expect(signedArea(ring)).toBeGreaterThan(0);
  }
  // 111.2 km a degree; 37.0° N, the latitude that the map is laid out for
  const km2PerDegree2 = 111.2 ** 2 * Math.cos((37 * Math.PI) / 180);
  for (const { geometry, properties } of featuresOf('catchment')) {
    const km2 = signedArea((geometry as Polygon).coordinates[0]) * km2PerDegree2;
    if (properties?.areaKm2 > 200) expect(Math.abs(km2 / properties?.areaKm2 - 1)).toBeLessThan(0.08);
  }
});

test('every station with an area stands on its river, at the edge of its own catchment and inside that downstream', () => {
  const vertices = new Set(
    featuresOf('river').flatMap(({ geometry }) => (geometry as LineString).coordinates.map((point) => point.join())),
  );
  const [basin] = featuresOf('other');
  for (const { longitude, latitude, code } of region.stations) {
    const point = [longitude!, latitude!];
    if (vertices.has(point.join())) continue;
    throw new Error(`${code} stands beside its river`);
  }
  const inland = region.stations.filter(({ longitude, latitude }) => holds(basin, [longitude!, latitude!]));
  expect(inland.length).toBeGreaterThanOrEqual(35);
});

test('catchments hold the stations upstream of them', () => {
  const byCode = new Map(featuresOf('catchment').map((feature) => [feature.properties?.code, feature]));
  const largest = region.stations.reduce((a, b) => ((b.areaKm2 ?? 0) > (a.areaKm2 ?? 0) ? b : a));
  const inside = region.stations.filter(({ longitude, latitude }) =>
    holds(byCode.get(largest.code)!, [longitude!, latitude!]),
  );
  expect(inside.length).toBeGreaterThan(10);
});
