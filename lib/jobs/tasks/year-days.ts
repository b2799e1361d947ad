import type { Season } from '../../calendar/season.ts';
import { yearDays as daysByYear, type YearDays } from '../../lowflow/year-days.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedYearDays, packYearDays } from '../pack-year-days.ts';

/** What the low-flow years of some stations hold; one without a record has no years.
 *  @returns `hashes`: of each record as read, null without one */
export function yearDays(task: { stationIds: number[]; options: { yearStart: number; season: Season } }): {
  packed: PackedYearDays;
  hashes: (string | null)[];
} {
  const found = new Map<number, { years: YearDays; hash: string }>();
  readSeries(task.stationIds, (id, series, hash) => {
    found.set(id, { years: daysByYear(series, task.options), hash });
  });
  return {
    packed: packYearDays(
      task.stationIds.map((stationId) => ({ stationId, years: found.get(stationId)?.years ?? null })),
    ),
    hashes: task.stationIds.map((id) => found.get(id)?.hash ?? null),
  };
}
