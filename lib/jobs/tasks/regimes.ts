import type { ExcludableFlag } from '../../basis.ts';
import { monthlyRegime } from '../../series/monthly-regime.ts';
import { readSeries } from '../../store/records.ts';

const MONTHS = 12;

/** Monthly regimes of some stations.
 *  @returns twelve ratios a station, end to end in the order of `stationIds`, NaN for one without a record; and the hash
 *           of each record as read, null without one */
export function regimes(task: { stationIds: number[]; exclude: ExcludableFlag[] }): {
  ratios: Float64Array;
  hashes: (string | null)[];
} {
  const place = new Map(task.stationIds.map((id, i) => [id, i]));
  const ratios = new Float64Array(task.stationIds.length * MONTHS).fill(Number.NaN);
  const hashes = new Array<string | null>(task.stationIds.length).fill(null);
  readSeries(task.stationIds, (id, series, hash) => {
    const at = place.get(id)!;
    ratios.set(monthlyRegime(series, task.exclude), at * MONTHS);
    hashes[at] = hash;
  });
  return { ratios, hashes };
}
