import type { Basis, BasisKey } from '../basis.ts';
import type { MinimaOptions } from '../lowflow/annual-minima.ts';
import { cached } from './cached.ts';
import { joinPacked, type PackedMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { checkAsRead } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';

const KEYS: readonly BasisKey[] = ['yearStart', 'season', 'days', 'maxMissingDays', 'exclude'];

/** The terms of a basis that annual minima read. */
export function minimaOptions(basis: Basis, yearStart: number): MinimaOptions {
  const { season, days, maxMissingDays, exclude } = basis;
  return { yearStart, season, days, maxMissingDays, exclude };
}

/** Key of the minima of all stations: equal exactly when all that they depend on is equal. */
export function minimaKey(stations: readonly StationInput[], basis: Basis, yearStart: number): string {
  return resultKey('minima', { values: { ...basis, yearStart }, keys: KEYS }, stations, 'none');
}

/** The minima of all stations for a resolved start month, as kept or computed now. */
export function storedMinima(
  stations: readonly StationInput[],
  basis: Basis,
  yearStart: number,
): Promise<PackedMinima> {
  return cached('minima', minimaKey(stations, basis, yearStart), async () => {
    const options = minimaOptions(basis, yearStart);
    const packs = chunksOf(stations).map(async (chunk) => {
      const read = await runTask('minima', { stationIds: chunk.map(({ facts }) => facts.id), options });
      checkAsRead(chunk, read.hashes);
      return read.packed;
    });
    return joinPacked(await Promise.all(packs));
  });
}

/** Keeps minima that were computed on the way to something else, for storedMinima to find. */
export async function keepMinima(
  stations: readonly StationInput[],
  basis: Basis,
  yearStart: number,
  packs: readonly PackedMinima[],
): Promise<void> {
  await cached('minima', minimaKey(stations, basis, yearStart), async () => joinPacked(packs));
}
