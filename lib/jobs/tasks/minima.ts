import { annualMinima, type MinimaOptions } from '../../lowflow/annual-minima.ts';
import type { AnnualMinima } from '../../lowflow/annual-minima-types.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedMinima, packMinima } from '../pack-minima.ts';

/** Annual minima of some stations; one without a record has no years.
 *  @returns `hashes`: of each record as read, null without one */
export function minima(task: { stationIds: number[]; options: MinimaOptions }): {
  packed: PackedMinima;
  hashes: (string | null)[];
} {
  const found = new Map<number, { minima: AnnualMinima; hash: string }>();
  readSeries(task.stationIds, (id, series, hash) => {
    found.set(id, { minima: annualMinima(series, task.options), hash });
  });
  const none = noMinima(task.options);
  return {
    packed: packMinima(
      task.stationIds.map((stationId) => ({ stationId, minima: found.get(stationId)?.minima ?? none })),
    ),
    hashes: task.stationIds.map((id) => found.get(id)?.hash ?? null),
  };
}

/** The minima of a station without a record: no years. */
export function noMinima(options: MinimaOptions): AnnualMinima {
  return annualMinima({ firstDay: 0, values: new Float64Array(), flags: new Uint8Array() }, options);
}
