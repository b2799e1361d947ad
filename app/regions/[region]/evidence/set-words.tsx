import type { GroupAnswer } from '@/lib/region/regional-types';
import table from './evidence-table.module.css';

/** Names a group in a table's first column; its independent set stands under it, set in. */
export function SetWords({ group: { label, set } }: { group: Pick<GroupAnswer, 'label' | 'set'> }) {
  return set === 'all' ? (
    <span className={table.capital}>{label}</span>
  ) : (
    <span className={table.under}>
      <span className="visually-hidden">{label}: </span>independent set
    </span>
  );
}
