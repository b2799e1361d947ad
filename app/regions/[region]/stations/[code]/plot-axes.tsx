import styles from './plot-axes.module.css';
import { PLOT } from './plot-box';

type Position = (value: number) => number;

interface ValueAxisProps {
  ticks: readonly { value: number; text: string }[];
  y: Position;
  right: number;
  zero?: number;
}

/** The upright axis: a line across the plot at each value, its text to the left.
 *  @param zero  value of the line that stands out: the foot of what is measured from zero */
export function ValueAxis({ ticks, y, right, zero }: ValueAxisProps) {
  return ticks.map(({ value, text }) => (
    <g key={value} className={value === zero ? styles.zero : styles.grid}>
      <line x1={PLOT.left} x2={right} y1={y(value)} y2={y(value)} />
      <text x={PLOT.left - 8} y={y(value)} dy="0.32em" textAnchor="end">
        {text}
      </text>
    </g>
  ));
}

interface FootAxisProps {
  values: readonly number[];
  x: Position;
  bottom: number;
  textOf?(value: number): string;
}

/** The axis below the plot: a stroke at each value, its text under it. */
export function FootAxis({ values, x, bottom, textOf = String }: FootAxisProps) {
  return values.map((value) => (
    <g key={value} className={styles.foot}>
      <line x1={x(value)} x2={x(value)} y1={bottom} y2={bottom + 5} />
      <text x={x(value)} y={bottom + 19} textAnchor="middle">
        {textOf(value)}
      </text>
    </g>
  ));
}
