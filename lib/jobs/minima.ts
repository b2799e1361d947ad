import type { Basis } from '../basis.ts';
import type { StationMinima } from '../region/ranking-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { minimaKey, storedMinima } from './minima-results.ts';
import { type PackedMinima, unpackMinima } from './pack-minima.ts';
import { withInputs } from './region-inputs.ts';
import type { StationInput } from './result-key.ts';
import { yearStartOf } from './year-start.ts';

/** Annual minima of every station of a region, packed, with the first month of the low-flow year they are of. */
export interface RegionMinima {
  yearStart: number;
  packed: PackedMinima;
}

/** Annual minima of a region's stations under a basis, stations by code; a station without a record has no years.
 *  @returns `key`: equal exactly when all that the minima depend on is equal, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function minimaOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ stations: StationMinima[]; yearStart: number; key: string }> {
  return withInputs(region.id, async (inputs) => {
    const { packed, yearStart } = await packedMinimaOf(inputs, basis);
    const minima = unpackMinima(packed);
    const stations = inputs.map(({ facts }) => ({ station: facts, minima: minima.get(facts.id)! }));
    return { stations, yearStart, key: minimaKey(inputs, basis, yearStart) };
  });
}

/** The same in the form that goes to the workers. */
export async function packedMinimaOf(stations: readonly StationInput[], basis: Basis): Promise<RegionMinima> {
  const yearStart = await yearStartOf(stations, basis);
  return { yearStart, packed: await storedMinima(stations, basis, yearStart) };
}
