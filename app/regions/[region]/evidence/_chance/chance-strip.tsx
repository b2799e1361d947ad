import type { BeyondChance } from '@/lib/region/regional-types';
import styles from './chance.module.css';

/** More stations than chance brings, in 95 of 100 regions without any trend. */
export const isBeyond = ({ count, bound }: BeyondChance): boolean => count > bound;

interface Props {
  found: BeyondChance;
  side: 'falling' | 'rising';
  /** stations of the group: the right end of its strip */
  ranked: number;
}

const WIDTH = 132;
const HEIGHT = 22;

/** The count on a line from none to all stations of the group; grey as far as chance goes, the mark filled when it lies beyond.
 *  Decoration: the figures stand beside it. */
export function ChanceStrip({ found, side, ranked }: Props) {
  const x = (stations: number) => 6 + ((WIDTH - 12) * stations) / Math.max(1, ranked);
  const middle = HEIGHT / 2;
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} width={WIDTH} height={HEIGHT} aria-hidden="true" className={styles.strip}>
      <path d={`M${x(0)} ${middle}H${x(ranked)}`} className={styles.axis} />
      <path d={`M${x(0)} ${middle - 5}H${x(found.bound)}V${middle + 5}H${x(0)}Z`} className={styles.chance} />
      <path d={`M${x(found.expected)} ${middle - 5}V${middle + 5}`} className={styles.expected} />
      <circle
        cx={x(found.count)}
        cy={middle}
        r="5"
        className={`${styles[side]} ${isBeyond(found) ? styles.filled : styles.open}`}
      />
    </svg>
  );
}
