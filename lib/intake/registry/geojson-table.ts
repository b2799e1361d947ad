import { isJsonObject, type JsonObject, jsonOrDeep } from '../json-object.ts';
import { IntakeError } from '../types.ts';
import { registryColumns } from './registry-columns.ts';
import type { RegistryTable } from './registry-table.ts';

/** GeoJSON points (RFC 7946) as a table: a column for each property, and the position of the point before any that the
 *  properties give. Lists and objects among the properties stand as JSON.
 *  @throws IntakeError for other JSON, and for features that are no points */
export function geoJsonTable(text: string, file: string): RegistryTable {
  const features = featuresOf(text, file);
  const names = new Set<string>();
  const hasId = features.some(({ id }) => id !== undefined && id !== null);
  for (const { properties } of features)
    for (const name of Object.keys(isJsonObject(properties) ? properties : {})) names.add(name);
  const properties = [...names];
  const found = registryColumns(properties);
  // A point's own coordinates are longitude and latitude in WGS 84; what the properties repeat of them may be rounded.
  const places = [found.latitude, found.longitude];
  const id = found.code < 0 && hasId;
  const header = [
    ...properties.map((name, at) => (places.includes(at) ? '' : name)),
    'latitude',
    'longitude',
    ...(id ? ['id'] : []),
  ];
  const columns = registryColumns(header);
  if (columns.code < 0) {
    throw new IntakeError({
      ...{ file, value: properties.join(', ').slice(0, 200) },
      message: 'no property of the features is a station code',
      remedy: 'Give each feature a property code (or id, site_no, station), and name, river, area_km2',
    });
  }
  const rows = features.map((feature, at) => ({
    line: at + 1,
    fields: [
      ...properties.map((name) => textOf(feature, name)),
      ...positionOf(feature, at + 1, file),
      ...(id ? [String(feature.id ?? '')] : []),
    ],
  }));
  return { header, headerLine: 1, columns, rows, delimiter: ', ' };
}

function textOf({ properties }: JsonObject, name: string): string {
  const value = isJsonObject(properties) && Object.hasOwn(properties, name) ? properties[name] : null;
  if (value === null || value === undefined) return '';
  return typeof value === 'object' ? jsonOrDeep(value) : String(value);
}

/** Latitude and longitude; both empty for a feature without a place. */
function positionOf({ geometry }: JsonObject, number: number, file: string): [string, string] {
  if (geometry === null || geometry === undefined) return ['', ''];
  const position = isJsonObject(geometry) && geometry.type === 'Point' ? geometry.coordinates : null;
  if (Array.isArray(position) && typeof position[0] === 'number' && typeof position[1] === 'number')
    return [String(position[1]), String(position[0])];
  throw new IntakeError({
    ...{ file, row: number, value: isJsonObject(geometry) ? String(geometry.type) : String(geometry) },
    message: `feature ${number} is no point, so it is no station`,
    remedy: 'Give stations as points in longitude and latitude; lines and polygons belong into a layer of their own',
  });
}

function featuresOf(text: string, file: string): JsonObject[] {
  const parsed = parsedJson(text, file);
  const list = isJsonObject(parsed) && parsed.type === 'FeatureCollection' ? parsed.features : [parsed];
  const features = Array.isArray(list) ? list : [];
  const wrong = features.findIndex((feature) => !isJsonObject(feature) || feature.type !== 'Feature');
  if (features.length > 0 && wrong < 0) return features as JsonObject[];
  throw new IntakeError({
    file,
    ...(wrong < 0 ? {} : { row: wrong + 1 }),
    message: wrong < 0 ? 'the file has no features' : 'the file is JSON but not a GeoJSON FeatureCollection of points',
    remedy: 'Export the stations as GeoJSON points (RFC 7946)',
  });
}

function parsedJson(text: string, file: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    if (!(cause instanceof SyntaxError)) throw cause;
    throw new IntakeError({
      ...{ file, value: text.slice(-60).trim() },
      message: `the file is not valid JSON: ${cause.message.slice(0, 200)}`,
      remedy: 'Export the stations again; a file that was cut short ends too early',
    });
  }
}
