import type { RegionRow } from '@/lib/store/regions';
import { getStation, type StationRow } from '@/lib/store/stations';
import { Problem } from './problem';

export type StationParams = { region: string; code: string };

/** The station of a region that an address names.
 *  @throws Problem 'not-found' */
export async function stationOf(region: RegionRow, { code }: { code: string }): Promise<StationRow> {
  const station = await getStation(region.id, code);
  if (!station) throw new Problem('not-found', `${region.name} has no station "${code}".`);
  return station;
}
