import { annualIndex as indexOfYears, type RecordIndex } from '../../lowflow/annual-index.ts';
import type { MinimaOptions } from '../../lowflow/annual-minima.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedMinima, unpackMinima } from '../pack-minima.ts';

/** One index of every year of some stations, from their daily flows.
 *  @returns `figures`: along the years of the packed minima; `hashes`: of each record as read, null without one */
export function annualIndex(task: { minima: PackedMinima; index: RecordIndex; options: MinimaOptions }): {
  figures: Float64Array;
  hashes: (string | null)[];
} {
  const { stationIds, starts, years } = task.minima;
  const minima = unpackMinima(task.minima);
  const place = new Map(Array.from(stationIds, (id, i) => [id, i]));
  const figures = new Float64Array(years.length).fill(Number.NaN);
  const hashes = new Array<string | null>(stationIds.length).fill(null);
  readSeries(stationIds, (id, series, hash) => {
    const at = place.get(id)!;
    hashes[at] = hash;
    figures.set(indexOfYears(series, minima.get(id)!, task.index, task.options), starts[at]);
  });
  return { figures, hashes };
}
