import type { GroupAnswer } from '@/lib/region/regional-types';
import table from './evidence-table.module.css';

/** What a group is called where it stands by itself. */
export const groupLabel = ({ id, label }: Pick<GroupAnswer, 'id' | 'label'>): string =>
  id === 'all' ? 'all stations' : label;

/** Names a group in a table's first column; its independent set stands under it, set in. */
export function SetWords({ group }: { group: Pick<GroupAnswer, 'id' | 'label' | 'set'> }) {
  const label = groupLabel(group);
  return group.set === 'all' ? (
    <span className={table.capital}>{label}</span>
  ) : (
    <span className={table.under}>
      <span className="visually-hidden">{label}: </span>independent set
    </span>
  );
}
