import type { AnnualIndexName } from '@/lib/basis';
import { INDEX_WORDS } from '@/lib/region/index-words';
import styles from './evidence.module.css';

/** What falling and rising mean on this page where the figures compared are no flows. */
export function FallingNote({ index }: { index: AnnualIndexName }) {
  const { falling, rising, many } = INDEX_WORDS[index];
  if (falling === 'falling') return null;
  return (
    <p className={styles.note}>
      These are {many}: “falling” on this page means {falling}, “rising” means {rising}.
    </p>
  );
}
