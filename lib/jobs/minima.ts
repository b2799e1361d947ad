import type { Basis, BasisKey } from '../basis.ts';
import type { StationMinima } from '../region/ranking-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { joinPacked, type PackedMinima, unpackMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { regionInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';
import { yearStartOf } from './year-start.ts';

const KEYS: readonly BasisKey[] = ['yearStart', 'season', 'days', 'maxMissingDays', 'exclude'];

/** Annual minima of every station of a region, packed, with the first month of the low-flow year they are of. */
export interface RegionMinima {
  yearStart: number;
  key: string;
  packed: PackedMinima;
}

/** Annual minima of a region's stations under a basis, stations by code; a station without a record has no years.
 *  @returns `key`: the key under which the result is kept, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function minimaOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ stations: StationMinima[]; yearStart: number; key: string }> {
  const inputs = await regionInputs(region.id);
  const { packed, yearStart, key } = await packedMinimaOf(inputs, basis);
  const minima = unpackMinima(packed);
  return { stations: inputs.map(({ facts }) => ({ station: facts, minima: minima.get(facts.id)! })), yearStart, key };
}

/** The same in the form that goes to the workers. */
export async function packedMinimaOf(stations: readonly StationInput[], basis: Basis): Promise<RegionMinima> {
  const yearStart = await yearStartOf(stations, basis);
  const { season, days, maxMissingDays, exclude } = basis;
  const key = resultKey('minima', { values: { ...basis, yearStart }, keys: KEYS }, stations, 'area');
  const packed = await cached('minima', key, async () => {
    const options = { yearStart, season, days, maxMissingDays, exclude };
    const ids = stations.map(({ facts }) => facts.id);
    const packs = await Promise.all(
      chunksOf(ids).map((chunk) => runTask('minima', { stationIds: Int32Array.from(chunk), options })),
    );
    return joinPacked(packs);
  });
  return { yearStart, key, packed };
}
