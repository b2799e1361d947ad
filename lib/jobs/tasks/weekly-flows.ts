import type { ExcludableFlag } from '../../basis.ts';
import { usableFlow } from '../../series/usable-flow.ts';
import { type WeeklyAnomalies, weeklyAnomalies } from '../../series/weekly-anomalies.ts';
import { readSeries } from '../../store/records.ts';

/** What a station's record says of the water that it shares with others. */
export interface WeeklyFlows extends WeeklyAnomalies {
  /** days with a value that is not excluded */
  valuedDays: number;
}

/** Deseasonalised weekly log flows of some stations; one without a record has none.
 *  @returns `hashes`: of each record as read, null without one */
export function weeklyFlows({ stationIds, exclude }: { stationIds: number[]; exclude: ExcludableFlag[] }): {
  flows: WeeklyFlows[];
  hashes: (string | null)[];
} {
  const place = new Map(stationIds.map((id, i) => [id, i]));
  const none = (): WeeklyFlows => ({ firstWeek: 0, values: new Float32Array(), valuedDays: 0 });
  const flows = stationIds.map(none);
  const hashes = new Array<string | null>(stationIds.length).fill(null);
  readSeries(stationIds, (id, series, hash) => {
    const at = place.get(id)!;
    hashes[at] = hash;
    const flow = usableFlow(series, exclude);
    const valuedDays = flow.reduce((days, value) => (Number.isNaN(value) ? days : days + 1), 0);
    flows[at] = { ...weeklyAnomalies(series.firstDay, flow), valuedDays };
  });
  return { flows, hashes };
}
