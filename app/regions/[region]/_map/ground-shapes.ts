import type { GeoJsonObject, Geometry, Position } from 'geojson';

/** One feature in world pixels of zoom 0 (Web Mercator, 256 wide): its lines one after another in `xy`. */
export interface GroundShape {
  /** x, y, x, y, … of all lines */
  xy: Float64Array;
  /** where each line begins in `xy`, and the end of the last */
  starts: number[];
  area: boolean;
  point: boolean;
  properties: Record<string, unknown>;
  minX: number;
  minY: number;
  maxX: number;
  maxY: number;
}

/** The poles are infinitely far on a Mercator map; it ends here, where it is square. */
const HIGHEST_LATITUDE = 85.0511287798;

export const worldX = (longitude: number): number => (256 * (longitude + 180)) / 360;
export const worldY = (latitude: number): number => {
  const angle = (Math.max(-HIGHEST_LATITUDE, Math.min(HIGHEST_LATITUDE, latitude)) * Math.PI) / 180;
  return 128 * (1 - Math.log(Math.tan(Math.PI / 4 + angle / 2)) / Math.PI);
};

/** All shapes of a GeoJSON object, a step a feature, so that the work can be done in slices. */
export function* groundShapes(data: GeoJsonObject): Generator<GroundShape> {
  if (data.type === 'FeatureCollection') {
    const { features } = data as GeoJSON.FeatureCollection;
    for (const feature of features) yield* groundShapes(feature);
  } else if (data.type === 'Feature') {
    const { geometry, properties } = data as GeoJSON.Feature<Geometry | null>;
    if (geometry) yield* shapesOf(geometry, properties ?? {});
  } else {
    yield* shapesOf(data as Geometry, {});
  }
}

function* shapesOf(geometry: Geometry, properties: Record<string, unknown>): Generator<GroundShape> {
  switch (geometry.type) {
    case 'GeometryCollection':
      for (const part of geometry.geometries) yield* shapesOf(part, properties);
      break;
    case 'Polygon':
      yield shape(geometry.coordinates, 'area', properties);
      break;
    case 'MultiPolygon':
      for (const polygon of geometry.coordinates) yield shape(polygon, 'area', properties);
      break;
    case 'LineString':
      yield shape([geometry.coordinates], 'line', properties);
      break;
    case 'MultiLineString':
      yield shape(geometry.coordinates, 'line', properties);
      break;
    case 'Point':
      yield shape([[geometry.coordinates]], 'point', properties);
      break;
    case 'MultiPoint':
      yield shape([geometry.coordinates], 'point', properties);
      break;
  }
}

function shape(lines: Position[][], kind: 'area' | 'line' | 'point', properties: Record<string, unknown>): GroundShape {
  const starts = [0];
  for (const line of lines) starts.push(starts[starts.length - 1] + 2 * line.length);
  const xy = new Float64Array(starts[starts.length - 1]);
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity];
  let at = 0;
  for (const line of lines) {
    for (const [longitude, latitude] of line) {
      const [x, y] = [worldX(longitude), worldY(latitude)];
      xy[at++] = x;
      xy[at++] = y;
      minX = Math.min(minX, x);
      maxX = Math.max(maxX, x);
      minY = Math.min(minY, y);
      maxY = Math.max(maxY, y);
    }
  }
  return { xy, starts, area: kind === 'area', point: kind === 'point', properties, minX, minY, maxX, maxY };
}
