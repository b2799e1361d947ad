import type { ExcludableFlag } from '../../basis.ts';
import { annualMinima, type MinimaOptions } from '../../lowflow/annual-minima.ts';
import type { AnnualMinima } from '../../lowflow/annual-minima-types.ts';
import { monthlyRegime } from '../../series/monthly-regime.ts';
import { usableFlow } from '../../series/usable-flow.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedMinima, packMinima } from '../pack-minima.ts';
import { noMinima } from './minima.ts';

const MONTHS = 12;

export interface RegimesTask {
  stationIds: number[];
  exclude: ExcludableFlag[];
  /** also answer the minima under these terms, with the same `exclude`: reading a record costs as much as computing from it */
  minimaOptions: MinimaOptions | null;
}

/** Monthly regimes of some stations, and on the way their minima.
 *  @returns `ratios`: twelve a station, end to end in the order of `stationIds`, NaN for one without a record;
 *           `hashes`: of each record as read, null without one */
export function regimes({ stationIds, exclude, minimaOptions }: RegimesTask): {
  ratios: Float64Array;
  minima: PackedMinima | null;
  hashes: (string | null)[];
} {
  const place = new Map(stationIds.map((id, i) => [id, i]));
  const ratios = new Float64Array(stationIds.length * MONTHS).fill(Number.NaN);
  const hashes = new Array<string | null>(stationIds.length).fill(null);
  const minima = new Array<AnnualMinima | null>(stationIds.length).fill(null);
  readSeries(stationIds, (id, series, hash) => {
    const at = place.get(id)!;
    hashes[at] = hash;
    const flow = usableFlow(series, exclude);
    ratios.set(monthlyRegime(series, exclude, flow), at * MONTHS);
    if (minimaOptions) minima[at] = annualMinima(series, minimaOptions, flow);
  });
  if (!minimaOptions) return { ratios, hashes, minima: null };
  const none = noMinima(minimaOptions);
  const packed = packMinima(stationIds.map((stationId, i) => ({ stationId, minima: minima[i] ?? none })));
  return { ratios, hashes, minima: packed };
}
