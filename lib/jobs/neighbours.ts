import type { RankingRow } from '../region/ranking-types.ts';
import type { Neighbour } from './types.ts';

/** Mean radius of the Earth, km (IUGG). */
const EARTH_RADIUS_KM = 6371.0088;
const MOST = 6;

/** The stations nearest to one, nearest first, at most six; none when its place is not known.
 *  Distances are great circles on a sphere, good to 0.5 %. */
export function neighboursOf(code: string, rows: readonly RankingRow[]): Neighbour[] {
  const here = rows.find((row) => row.code === code);
  if (!here) return [];
  return rows
    .filter((row) => row.code !== code)
    .map((row) => ({ row, distanceKm: distanceKm(here, row) }))
    .filter(({ distanceKm }) => !Number.isNaN(distanceKm))
    .sort((a, b) => a.distanceKm - b.distanceKm || (a.row.code < b.row.code ? -1 : 1))
    .slice(0, MOST)
    .map(({ row, distanceKm }) => ({
      station: factsOf(row),
      distanceKm,
      rank: row.rank,
      percentPerDecade: row.percentPerDecade,
      trend: row.trend,
    }));
}

function factsOf({ id, code, name, river, latitude, longitude, areaKm2, influence }: RankingRow): Neighbour['station'] {
  return { id, code, name, river, latitude, longitude, areaKm2, influence };
}

type Place = { latitude: number | null; longitude: number | null };

/** Great-circle distance by the haversine formula; NaN when either place is not known. */
function distanceKm(a: Place, b: Place): number {
  if (a.latitude === null || a.longitude === null || b.latitude === null || b.longitude === null) return Number.NaN;
  const radians = Math.PI / 180;
  const halfLatitude = ((b.latitude - a.latitude) * radians) / 2;
  const halfLongitude = ((b.longitude - a.longitude) * radians) / 2;
  const chord =
    Math.sin(halfLatitude) ** 2 +
    Math.cos(a.latitude * radians) * Math.cos(b.latitude * radians) * Math.sin(halfLongitude) ** 2;
  return 2 * EARTH_RADIUS_KM * Math.asin(Math.min(1, Math.sqrt(chord)));
}
