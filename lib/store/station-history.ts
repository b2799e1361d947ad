import { whenFree } from './busy.ts';
import { StoreError } from './errors.ts';
import { openStore } from './open.ts';
import type { StationChange } from './stations.ts';

/** Sets what is known of a station beyond its facts: dated changes on the river or at the gauge, and notes.
 *  @throws StoreError 'not-found' when the region has no such station */
export async function setStationHistory(
  regionId: number,
  code: string,
  { changes, notes }: { changes: readonly StationChange[]; notes: string },
): Promise<void> {
  const data = { changes: JSON.stringify(changes), notes };
  const { count } = await whenFree(() => openStore().prisma.station.updateMany({ where: { regionId, code }, data }));
  if (count === 0) throw new StoreError('not-found', `The region has no station "${code}".`);
}
