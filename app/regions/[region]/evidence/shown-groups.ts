import type { GroupAnswer } from '@/lib/region/regional-types';

/** The groups that a table shows: an independent set only where it leaves somebody out and keeps somebody, a class of
 *  influence only where another one has stations too. */
export function shownGroups(groups: readonly GroupAnswer[]): GroupAnswer[] {
  const whole = new Map(groups.filter(({ set }) => set === 'all').map(({ id, ranked }) => [id, ranked]));
  const only = [...whole.keys()].find((id) => isClass(id) && whole.get(id) === whole.get('all'));
  return groups.filter(
    ({ id, set, ranked }) => id !== only && (set === 'all' || (ranked > 0 && ranked !== whole.get(id))),
  );
}

/** Whether no influence is known of any ranked station, so that natural and regulated ones cannot be told apart. */
export function noInfluenceKnown(groups: readonly GroupAnswer[]): boolean {
  const whole = (wanted: string) => groups.find(({ id, set }) => id === wanted && set === 'all')?.ranked ?? 0;
  return whole('all') > 0 && whole('influence:unknown') === whole('all');
}

const isClass = (id: string): boolean => id.startsWith('influence:');
