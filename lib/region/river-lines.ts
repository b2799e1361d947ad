/** One line of a river layer: its river's name, '' where it has none, and its points as [longitude, latitude]. */
export interface RiverLine {
  name: string;
  points: readonly (readonly [number, number])[];
}

/** Properties under which layers keep the name of a river, compared without regard to case. */
const NAME_PROPERTIES = ['name', 'river', 'river_name', 'rivername', 'gnis_name'];

/** The lines of a river layer. Points, polygons and lines of fewer than two good points are passed over.
 *  @param geojson  a parsed GeoJSON document (RFC 7946) of any kind */
export function riverLines(geojson: unknown): RiverLine[] {
  const found: RiverLine[] = [];
  visit(geojson, '');
  return found;

  function visit(value: unknown, name: string): void {
    if (!isObject(value)) return;
    switch (value.type) {
      case 'FeatureCollection':
        for (const feature of listOf(value.features)) visit(feature, '');
        return;
      case 'Feature':
        visit(value.geometry, nameIn(value.properties));
        return;
      case 'GeometryCollection':
        for (const geometry of listOf(value.geometries)) visit(geometry, name);
        return;
      case 'LineString':
        add(value.coordinates, name);
        return;
      case 'MultiLineString':
        for (const line of listOf(value.coordinates)) add(line, name);
    }
  }

  function add(coordinates: unknown, name: string): void {
    const points = listOf(coordinates).filter(isPoint);
    if (points.length >= 2) found.push({ name, points });
  }
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null;
const listOf = (value: unknown): unknown[] => (Array.isArray(value) ? value : []);
const isPoint = (value: unknown): value is [number, number] =>
  Array.isArray(value) && Number.isFinite(value[0]) && Number.isFinite(value[1]);

function nameIn(properties: unknown): string {
  if (!isObject(properties)) return '';
  for (const [key, value] of Object.entries(properties)) {
    if (NAME_PROPERTIES.includes(key.toLowerCase()) && typeof value === 'string') return value;
  }
  return '';
}
