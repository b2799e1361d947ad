import { isJsonObject, jsonOrDeep } from './json-object.ts';
import { IntakeError, type LayerFile } from './types.ts';
import { readWholeText } from './whole-text.ts';

const MOST_BYTES = 200e6;
const DRAWN = ['LineString', 'MultiLineString', 'Polygon', 'MultiPolygon'];
/** How deep the positions of each geometry lie in its lists. */
const DEPTHS: Record<string, number> = { LineString: 1, MultiLineString: 2, Polygon: 2, MultiPolygon: 3 };

type Bounds = [number, number, number, number];
/** Reads a map layer: a GeoJSON FeatureCollection (or one Feature) of lines or polygons in longitude and latitude
 *  (RFC 7946). Its kind is told by its shapes: lines are rivers, polygons catchments, a mixture other.
 *  @throws IntakeError naming the feature and the position that cannot be */
export async function readLayer(path: string, fileName: string): Promise<LayerFile> {
  const { text, sha256 } = await readWholeText(path, fileName, MOST_BYTES);
  const parsed = parseJson(text, fileName);
  const features = featuresOf(parsed, fileName);
  const bounds: Bounds = [
    Number.POSITIVE_INFINITY,
    Number.POSITIVE_INFINITY,
    Number.NEGATIVE_INFINITY,
    Number.NEGATIVE_INFINITY,
  ];
  const shapes = new Map<string, number>();
  let empty = 0;
  for (const [at, feature] of features.entries()) {
    const shape = checkFeature(feature, at + 1, fileName, bounds);
    if (shape === null) empty++;
    else shapes.set(shape, (shapes.get(shape) ?? 0) + 1);
  }
  if (shapes.size === 0)
    throw problem(fileName, 'none of its features has a shape', 'Export the layer again with its geometry');
  return {
    name: fileName.replace(/^.*[\\/]/, '').replace(/(?<=.)\.[^.]*$/, ''),
    kind: kindOf([...shapes.keys()]),
    geojson:
      isJsonObject(parsed) && parsed.type === 'FeatureCollection'
        ? text
        : JSON.stringify({ type: 'FeatureCollection', features }),
    ...{ features: features.length, bounds, sha256 },
    warnings: empty > 0 ? [`${empty} features have no shape and are not drawn.`] : [],
  };
}

function problem(file: string, message: string, remedy: string, value?: string): IntakeError {
  return new IntakeError({ file, message, remedy, ...(value === undefined ? {} : { value: value.slice(0, 200) }) });
}

function parseJson(text: string, file: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    const position = Number(/position (\d+)/.exec((cause as Error).message)?.[1] ?? Number.NaN);
    const cut = /end of JSON/i.test((cause as Error).message);
    const at = cut ? text.length : position;
    throw new IntakeError({
      file,
      ...(Number.isNaN(at)
        ? {}
        : { row: text.slice(0, at).split('\n').length, value: text.slice(Math.max(0, at - 20), at + 20) }),
      message: cut ? 'the JSON ends too early: the file was cut' : 'the file is not valid JSON',
      remedy: 'Export the layer again as GeoJSON',
    });
  }
}

function featuresOf(parsed: unknown, file: string): unknown[] {
  if (isJsonObject(parsed) && parsed.type === 'FeatureCollection' && Array.isArray(parsed.features)) {
    if (parsed.features.length > 0) return parsed.features;
    throw problem(file, 'the layer has no features', 'Export it again with the lines or polygons that it should hold');
  }
  if (isJsonObject(parsed) && parsed.type === 'Feature') return [parsed];
  const type = isJsonObject(parsed) ? String(parsed.type ?? 'an object without a type') : 'no object';
  throw problem(
    file,
    'the file is JSON but not a GeoJSON FeatureCollection',
    'Export the layer as GeoJSON (RFC 7946)',
    type,
  );
}

/** @returns the shape's type; null when the feature has none. Widens `bounds`. */
function checkFeature(feature: unknown, number: number, file: string, bounds: Bounds): string | null {
  if (!isJsonObject(feature) || feature.type !== 'Feature') {
    throw problem(
      file,
      `feature ${number} is not a GeoJSON Feature`,
      'Export the layer again as GeoJSON',
      jsonOrDeep(feature),
    );
  }
  const { geometry } = feature;
  if (geometry === null || geometry === undefined) return null;
  const type = isJsonObject(geometry) ? String(geometry.type) : String(geometry);
  if (!isJsonObject(geometry) || !DRAWN.includes(type)) {
    throw problem(file, `feature ${number} is neither a line nor a polygon`, `Keep only ${DRAWN.join(', ')}`, type);
  }
  checkPositions(geometry.coordinates, DEPTHS[type], { number, file, bounds });
  return type;
}

function checkPositions(list: unknown, depth: number, about: { number: number; file: string; bounds: Bounds }): void {
  const { number, file, bounds } = about;
  if (!Array.isArray(list)) {
    throw problem(
      file,
      `feature ${number} has no list of positions`,
      'Export the layer again as GeoJSON',
      jsonOrDeep(list),
    );
  }
  if (depth > 0) {
    for (const inner of list) checkPositions(inner, depth - 1, about);
    return;
  }
  const [longitude, latitude] = list;
  const sound = typeof longitude === 'number' && typeof latitude === 'number';
  if (!sound || !(Math.abs(longitude) <= 180) || !(Math.abs(latitude) <= 90)) {
    throw problem(
      file,
      `feature ${number} has a position that is no longitude (−180 to 180) and latitude (−90 to 90)`,
      'Export the layer in WGS 84 (EPSG:4326), longitude first',
      jsonOrDeep(list),
    );
  }
  bounds[0] = Math.min(bounds[0], longitude);
  bounds[1] = Math.min(bounds[1], latitude);
  bounds[2] = Math.max(bounds[2], longitude);
  bounds[3] = Math.max(bounds[3], latitude);
}

function kindOf(shapes: readonly string[]): LayerFile['kind'] {
  const lines = shapes.some((shape) => shape.endsWith('LineString'));
  const polygons = shapes.some((shape) => shape.endsWith('Polygon'));
  if (lines && polygons) return 'other';
  return lines ? 'river' : 'catchment';
}
