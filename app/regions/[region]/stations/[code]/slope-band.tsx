import { useId } from 'react';
import type { SlopeLine } from '@/lib/jobs/types';
import styles from './slope-band.module.css';

type Position = (value: number) => number;

interface Props {
  slope: SlopeLine;
  x: Position;
  y: Position;
  /** what lies above or below is cut off, pixels: there are no flows or days below zero */
  top: number;
  bottom: number;
}

/** A slope line over its interval, in the colour that `--mark` has. */
export function SlopeBand({ slope, x, y, top, bottom }: Props) {
  const id = useId();
  const [left, right] = [x(slope.firstYear), x(slope.lastYear)];
  return (
    <g className={styles.slope} clipPath={`url(#${id})`}>
      <clipPath id={id}>
        <rect x={left} y={top} width={Math.max(0, right - left)} height={Math.max(0, bottom - top)} />
      </clipPath>
      {slope.low && slope.high && (
        <path
          className={styles.interval}
          d={`M${left},${y(slope.low[0])}L${right},${y(slope.low[1])}V${y(slope.high[1])}L${left},${y(slope.high[0])}Z`}
        />
      )}
      <line x1={left} x2={right} y1={y(slope.fitted[0])} y2={y(slope.fitted[1])} />
    </g>
  );
}

/** The same in a key. */
export function SlopeSample() {
  return (
    <g className={styles.slope}>
      <path className={styles.interval} d="M0,1L14,4V10L0,13Z" />
      <line x1="0" x2="14" y1="7" y2="7" />
    </g>
  );
}
