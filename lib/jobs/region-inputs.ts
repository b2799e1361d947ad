import { stationRecords } from '../store/records.ts';
import { listStations } from '../store/stations.ts';
import type { StationInput } from './result-key.ts';

/** All stations of a region by code, each with the hash of its record: what every analysis starts from. */
export async function regionInputs(regionId: number): Promise<StationInput[]> {
  const [stations, records] = await Promise.all([listStations(regionId), stationRecords(regionId)]);
  const hashes = new Map(records.map(({ stationId, hash }) => [stationId, hash]));
  return stations.map((facts) => ({ facts, dataHash: hashes.get(facts.id) ?? null }));
}
