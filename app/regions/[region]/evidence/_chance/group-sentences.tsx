import type { GroupAnswer } from '@/lib/region/regional-types';
import table from '../evidence-table.module.css';
import { groupLabel } from '../set-words.tsx';
import { shownGroups } from '../shown-groups.ts';
import styles from './chance.module.css';

/** What is found for every group, in sentences that can be read out and quoted. */
export function GroupSentences({ groups }: { groups: readonly GroupAnswer[] }) {
  return (
    <details className={table.details} data-open-in-print>
      <summary>In words, group by group</summary>
      <dl className={styles.sentences}>
        {shownGroups(groups).map(({ id, set, label, sentences }) => (
          <div key={`${id} ${set}`}>
            <dt>
              {groupLabel({ id, label })}
              {set === 'independent' && ', independent set'}
            </dt>
            <dd>
              {[...new Set([sentences.chance, sentences.discoveries])].filter(Boolean).map((sentence) => (
                <p key={sentence}>{sentence}</p>
              ))}
            </dd>
          </div>
        ))}
      </dl>
    </details>
  );
}
