import type { GroupAnswer } from '@/lib/region/regional-types';
import styles from './chance.module.css';

/** What is found for every group, in sentences that can be read out and quoted. */
export function GroupSentences({ groups }: { groups: readonly GroupAnswer[] }) {
  return (
    <dl className={styles.sentences}>
      {groups.map(({ id, set, label, sentences }) => (
        <div key={`${id} ${set}`}>
          <dt>
            {label}
            {set === 'independent' && ', independent set'}
          </dt>
          <dd>
            {[sentences.chance, sentences.discoveries].filter(Boolean).map((sentence) => (
              <p key={sentence}>{sentence}</p>
            ))}
          </dd>
        </div>
      ))}
    </dl>
  );
}
