import type { AnnualIndexName, Basis, BasisKey } from '../basis.ts';
import type { RecordIndex } from '../lowflow/annual-index.ts';
import { INDEX_FACTS } from '../region/index-facts.ts';
import { cached } from './cached.ts';
import type { RegionMinima } from './minima.ts';
import { minimaOptions } from './minima-results.ts';
import { packMinima, unpackMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { checkAsRead } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';

const KEYS: readonly BasisKey[] = ['yearStart', 'season', 'days', 'maxMissingDays', 'exclude', 'index'];

const isFromRecord = (index: AnnualIndexName): index is RecordIndex => INDEX_FACTS[index].fromRecord;

/** The basis's annual index of all stations where the minima do not bring it along, as kept or computed now: one figure
 *  a year of the packed minima, in their order. Null for an index that they do bring along: no record is read for it.
 *  @param minima  of the same stations under the same basis */
export async function indexFiguresOf(
  stations: readonly StationInput[],
  minima: RegionMinima,
  basis: Basis,
): Promise<Float64Array | null> {
  const { index } = basis;
  if (!isFromRecord(index)) return null;
  const key = resultKey(
    'annual-index',
    { values: { ...basis, yearStart: minima.yearStart }, keys: KEYS },
    stations,
    'none',
  );
  return cached('annual-index', key, async () => {
    const options = minimaOptions(basis, minima.yearStart);
    const byStation = unpackMinima(minima.packed);
    const parts = await Promise.all(
      chunksOf(stations).map(async (chunk) => {
        const entries = chunk.map(({ facts: { id } }) => ({ stationId: id, minima: byStation.get(id)! }));
        const read = await runTask('annualIndex', { minima: packMinima(entries), index, options });
        checkAsRead(chunk, read.hashes);
        return read.figures;
      }),
    );
    const figures = new Float64Array(minima.packed.years.length);
    let at = 0;
    for (const part of parts) {
      figures.set(part, at);
      at += part.length;
    }
    return figures;
  });
}
