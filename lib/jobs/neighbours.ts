import { nearestStations } from '../region/neighbours.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import type { Neighbour } from './types.ts';

/** How many neighbours a station's page shows. */
const MOST = 6;

/** The stations nearest to one, nearest first, each with its place in the ranking; none when its place is not known. */
export function neighboursOf(code: string, rows: readonly RankingRow[]): Neighbour[] {
  const byCode = new Map(rows.map((row) => [row.code, row]));
  const here = byCode.get(code);
  if (!here) return [];
  return nearestStations(here, rows, MOST).map(({ code, km }) => {
    const row = byCode.get(code)!;
    const { rank, percentPerDecade, trend } = row;
    return { station: factsOf(row), distanceKm: km ?? Number.NaN, rank, percentPerDecade, trend };
  });
}

function factsOf({ id, code, name, river, latitude, longitude, areaKm2, influence }: RankingRow): Neighbour['station'] {
  return { id, code, name, river, latitude, longitude, areaKm2, influence };
}
