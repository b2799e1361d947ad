import type { GroupAnswer } from '@/lib/region/regional-types';
import { isBeyond } from './_chance/chance-strip.tsx';

/** Which groups speak at the top: the one that was drawn; all stations; the independent ones where they come to another
 *  verdict; and the natural ones, in which climate shows without management. */
export function toldGroups(groups: readonly GroupAnswer[]): GroupAnswer[] {
  const of = (id: string, set: GroupAnswer['set']) => groups.filter((group) => group.id === id && group.set === set);
  const all = of('all', 'all');
  const verdicts = all.map(verdictOf);
  const independent = of('all', 'independent').filter(
    (group) => group.ranked > 0 && !verdicts.includes(verdictOf(group)),
  );
  const natural = of('influence:natural', 'all').filter(({ ranked }) => ranked > 0 && ranked < (all[0]?.ranked ?? 0));
  return [...of('drawn', 'all'), ...all, ...independent, ...natural];
}

const verdictOf = ({ falling, rising }: GroupAnswer): string =>
  [falling, rising].map((found) => found !== null && isBeyond(found)).join();
