import { listStations, stationRecords } from '../store/stations.ts';
import type { StationInput } from './result-key.ts';

/** Thrown when a record is no longer the one that a result's key speaks of: the result would be kept under a wrong key. */
export class RecordsChangedError extends Error {
  override name = 'RecordsChangedError';
}

/** How often an analysis begins anew because an import changed records under its hands. */
const ATTEMPTS = 5;

/** Hands an analysis all stations of a region by code, each with the hash of its record; again from the beginning when
 *  an import changed a record meanwhile.
 *  @throws RecordsChangedError when records keep changing */
export async function withInputs<Result>(
  regionId: number,
  analysis: (inputs: StationInput[]) => Promise<Result>,
): Promise<Result> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await analysis(await regionInputs(regionId));
    } catch (error) {
      if (!(error instanceof RecordsChangedError) || attempt === ATTEMPTS) throw error;
    }
  }
}

/** All stations of a region by code, each with the hash of its record as read, marks included. */
export async function regionInputs(regionId: number): Promise<StationInput[]> {
  const [stations, records] = await Promise.all([listStations(regionId), stationRecords(regionId)]);
  const hashes = new Map(records.map(({ stationId, hash }) => [stationId, hash]));
  return stations.map((facts) => ({ facts, dataHash: hashes.get(facts.id) ?? null }));
}

/** Makes sure that workers read the records that the stations' hashes speak of.
 *  @param readHashes  of each station's record as a worker read it, null without one, in the order of `stations`
 *  @throws RecordsChangedError */
export function checkAsRead(stations: readonly StationInput[], readHashes: readonly (string | null)[]): void {
  stations.forEach(({ facts, dataHash }, i) => {
    if (dataHash !== readHashes[i])
      throw new RecordsChangedError(`The record of ${facts.code} changed while it was read.`);
  });
}
