import styles from './duration-figure.module.css';
import { lineLook } from './line-looks';

/** A short piece of a figure's line, for tables and lists. */
export function LineSwatch({ index }: { index: number }) {
  const look = lineLook(index);
  return (
    <svg width="26" height="10" className={styles.swatch} aria-hidden="true">
      <path d="M1,5H25" stroke={look.colour} strokeWidth="2.25" strokeDasharray={look.dash} />
    </svg>
  );
}
