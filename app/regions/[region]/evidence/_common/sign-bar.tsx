import { fixed } from '@/app/components/format';
import type { GroupAnswer } from '@/lib/region/regional-types';
import styles from './common.module.css';

/** Stations by the sign of their slope: the figures, and a bar of their shares beneath. */
export function SignBar({ negative, zero, positive }: GroupAnswer['signs']) {
  const all = negative + zero + positive;
  const share = (stations: number) => `${all === 0 ? 0 : (100 * stations) / all}%`;
  return (
    <span className={styles.signs}>
      <span>
        {fixed(negative)} · {fixed(zero)} · {fixed(positive)}
      </span>
      <span className={styles.bar} aria-hidden="true">
        <span className={styles.negative} style={{ inlineSize: share(negative) }} />
        <span className={styles.zero} style={{ inlineSize: share(zero) }} />
        <span className={styles.positive} style={{ inlineSize: share(positive) }} />
      </span>
    </span>
  );
}
