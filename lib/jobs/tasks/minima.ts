import { annualMinima, type MinimaOptions } from '../../lowflow/annual-minima.ts';
import type { AnnualMinima } from '../../lowflow/annual-minima-types.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedMinima, packMinima } from '../pack-minima.ts';

/** Annual minima of some stations; one without a record has no years. */
export function minima(task: { stationIds: Int32Array; options: MinimaOptions }): PackedMinima {
  const found = new Map<number, AnnualMinima>();
  readSeries([...task.stationIds], (id, series) => {
    found.set(id, annualMinima(series, task.options));
  });
  const none = annualMinima({ firstDay: 0, values: new Float64Array(), flags: new Uint8Array() }, task.options);
  return packMinima(Array.from(task.stationIds, (stationId) => ({ stationId, minima: found.get(stationId) ?? none })));
}
