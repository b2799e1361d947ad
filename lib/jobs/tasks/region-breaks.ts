import type { ResolvedBasis } from '../../basis.ts';
import type { Break, RegionBreaks } from '../../region/break-types.ts';
import type { RankingRow } from '../../region/ranking-types.ts';
import { regionBreaks as compute } from '../../region/region-breaks.ts';

/** Levels before and after breaks at the stations of a region. In a worker, so that no page waits for it.
 *  @param task.breaks  of each station by code; those without any may be left out */
export function regionBreaks(task: {
  rows: RankingRow[];
  basis: ResolvedBasis;
  breaks: Map<string, Break[]>;
}): RegionBreaks {
  return compute(task, (code) => task.breaks.get(code) ?? []);
}
