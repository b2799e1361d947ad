import type { ResolvedBasis } from '../../basis.ts';
import { regionStartEnd } from '../../region/region-start-end.ts';
import type { StartEndRow } from '../../region/start-end.ts';
import type { RegionStartEnd } from '../../region/window-types.ts';

/** The start–end chart of some stations of a region.
 *  @param task.span  years of the axes of the whole region's chart */
export function startEndCounts(task: {
  rows: StartEndRow[];
  basis: ResolvedBasis;
  span: [number, number];
}): RegionStartEnd {
  return regionStartEnd(task.rows, task.basis, task.span);
}
