import { spreadLabels } from '@/app/components/duration-figure/spread-labels';
import styles from './level-lines.module.css';

interface Props {
  levels: readonly { label: string; y: number }[];
  left: number;
  right: number;
  /** where labels may stand, pixels */
  top: number;
  bottom: number;
}

/** Named flows across an SVG figure: a long-dashed line each, its name above it at the left. */
export function LevelLines({ levels, left, right, top, bottom }: Props) {
  if (levels.length === 0) return null;
  const labels = spreadLabels(
    levels.map(({ y }) => y - 8),
    15,
    [top, bottom],
  );
  return (
    <g className={styles.levels}>
      {levels.map(({ label, y }, index) => (
        <g key={label}>
          <line x1={left} x2={right} y1={y} y2={y} />
          <text x={left + 6} y={labels[index]} dy="0.32em">
            {label}
          </text>
        </g>
      ))}
    </g>
  );
}
