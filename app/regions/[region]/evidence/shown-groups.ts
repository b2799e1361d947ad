import type { GroupAnswer } from '@/lib/region/regional-types';

/** The groups that a table shows: an independent set only where it leaves somebody out and keeps somebody. */
export function shownGroups(groups: readonly GroupAnswer[]): GroupAnswer[] {
  const whole = new Map(groups.filter(({ set }) => set === 'all').map(({ id, ranked }) => [id, ranked]));
  return groups.filter(({ id, set, ranked }) => set === 'all' || (ranked > 0 && ranked !== whole.get(id)));
}
