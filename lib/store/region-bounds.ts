import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { VISIBLE } from './import-claim.ts';

/** Stations from which on they say where a region lies. */
const FEWEST = 3;

type Bounds = [number, number, number, number];

/** Where a region lies by its layers and its stations: west, south, east, north; null where neither says it. */
export function regionBounds(regionId: number, path = databasePath()): Bounds | null {
  const connection = sharedConnection(path);
  const [count, ...stations] = rows(
    connection,
    `SELECT COUNT(*), MIN(longitude), MIN(latitude), MAX(longitude), MAX(latitude) FROM Station
     WHERE regionId = ? AND latitude IS NOT NULL AND longitude IS NOT NULL`,
  ).get([regionId]) as [number, ...Bounds];
  const layers = rows(
    connection,
    `SELECT json_extract(report, '$.bounds') FROM Import WHERE regionId = ? AND kind = 'layer' AND state IN ${VISIBLE}`,
  ).all([regionId]) as [string | null][];
  const found = layers.flatMap(([text]) => (text === null ? [] : [JSON.parse(text) as Bounds]));
  if (count >= FEWEST) found.push(stations);
  if (found.length === 0) return null;
  const of = (at: number) => found.map((bounds) => bounds[at]);
  return [Math.min(...of(0)), Math.min(...of(1)), Math.max(...of(2)), Math.max(...of(3))];
}
