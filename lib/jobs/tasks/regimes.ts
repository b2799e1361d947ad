import type { ExcludableFlag } from '../../basis.ts';
import { monthlyRegime } from '../../series/monthly-regime.ts';
import { readSeries } from '../../store/records.ts';

const MONTHS = 12;

/** Monthly regimes of some stations, twelve ratios each, end to end in the order of `stationIds`; NaN for a station
 *  without a record. */
export function regimes(task: { stationIds: Int32Array; exclude: ExcludableFlag[] }): Float64Array {
  const place = new Map(Array.from(task.stationIds, (id, i) => [id, i]));
  const ratios = new Float64Array(task.stationIds.length * MONTHS).fill(Number.NaN);
  readSeries([...task.stationIds], (id, series) => {
    ratios.set(monthlyRegime(series, task.exclude), place.get(id)! * MONTHS);
  });
  return ratios;
}
