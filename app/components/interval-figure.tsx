import styles from './interval-figure.module.css';

/** The scale reaches no further than this many times the middle distance of an end from 0. */
const REACH = 8;

export interface IntervalScale {
  low: number;
  high: number;
}

/** One scale for all rows: 0 is always on it, and the widest intervals may run off its ends (an arrow says so).
 *  @param ends the interval ends of all rows; missing ones are skipped */
export function intervalScale(ends: (number | null)[]): IntervalScale {
  const known = ends.filter((end): end is number => end !== null && Number.isFinite(end)).sort((a, b) => a - b);
  if (known.length === 0) return { low: -1, high: 1 };
  // a few wide intervals must not flatten all others: the outer 1 % of ends may be cut
  const cut = Math.floor(known.length * 0.01);
  // nor may one that is far out where there are too few rows for that
  const distances = known.map(Math.abs).sort((a, b) => a - b);
  const reach = REACH * distances[distances.length >> 1] || Number.POSITIVE_INFINITY;
  const low = Math.max(-reach, Math.min(0, known[cut]));
  const high = Math.min(reach, Math.max(0, known[known.length - 1 - cut]));
  const pad = (high - low || 1) * 0.06;
  return { low: low - pad, high: high + pad };
}

interface IntervalFigureProps {
  scale: IntervalScale;
  value: number | null;
  low: number | null;
  high: number | null;
  significant: boolean;
  side?: 'falling' | 'rising' | 'level';
  width?: number;
  height?: number;
}

/** Estimate and interval against the zero line that all rows share. Decoration: give the figures in words beside it. */
export function IntervalFigure(props: IntervalFigureProps) {
  const { scale, value, low, high, significant, side = 'level', width = 110, height = 32 } = props;
  const x = (v: number) => ((v - scale.low) / (scale.high - scale.low)) * width;
  const middle = height / 2;
  const inside = (v: number) => Math.max(1, Math.min(width - 1, x(v)));
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width={width} height={height} aria-hidden="true" className={styles.figure}>
      <path d={`M${x(0).toFixed(1)} 0V${height}`} className={styles.zero} />
      {value !== null && (
        <g className={styles[side]}>
          {low !== null && high !== null && (
            <path d={`M${inside(low).toFixed(1)} ${middle}H${inside(high).toFixed(1)}`} className={styles.whisker} />
          )}
          {low !== null && low < scale.low && (
            <path d={`M4.5 ${middle - 3}L1 ${middle}l3.5 3`} className={styles.off} />
          )}
          {high !== null && high > scale.high && (
            <path d={`M${width - 4.5} ${middle - 3}L${width - 1} ${middle}l-3.5 3`} className={styles.off} />
          )}
          {value >= scale.low && value <= scale.high && (
            <circle
              cx={x(value).toFixed(1)}
              cy={middle}
              r="3.6"
              className={significant ? styles.filled : styles.open}
            />
          )}
        </g>
      )}
    </svg>
  );
}

/** The scale's words over the column: its ends and the zero between them. */
export function IntervalAxis({ scale, width = 110, ticks }: { scale: IntervalScale; width?: number; ticks: number[] }) {
  const x = (v: number) => ((v - scale.low) / (scale.high - scale.low)) * width;
  return (
    <svg viewBox={`0 0 ${width} 14`} width={width} height={14} aria-hidden="true" className={styles.axis}>
      {ticks.map((tick) => (
        <text key={tick} x={x(tick)} y="11" textAnchor="middle">
          {tick < 0 ? `\u2212${-tick}` : tick > 0 ? `+${tick}` : '0'}
        </text>
      ))}
    </svg>
  );
}
