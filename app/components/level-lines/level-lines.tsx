import { spreadLabels } from '@/app/components/duration-figure/spread-labels';
import { freePlace, type Point } from './free-place.ts';
import styles from './level-lines.module.css';

interface Props {
  levels: readonly { label: string; y: number }[];
  left: number;
  right: number;
  /** where labels may stand, pixels */
  top: number;
  bottom: number;
  /** what the names should not cover */
  points?: readonly Point[];
}

/** About what a letter takes at the size of the labels, pixels. */
const LETTER = 6.4;
const LABEL = 15;

/** Named flows across an SVG figure: a long-dashed line each, its name above it, at the left or behind the points there. */
export function LevelLines({ levels, left, right, top, bottom, points = [] }: Props) {
  if (levels.length === 0) return null;
  const labels = spreadLabels(
    levels.map(({ y }) => y - 8),
    LABEL,
    [top, bottom],
  );
  return (
    <g className={styles.levels}>
      {levels.map(({ label, y }, index) => (
        <g key={label}>
          <line x1={left} x2={right} y1={y} y2={y} />
          <text
            x={freePlace({ y: labels[index], width: label.length * LETTER, height: LABEL }, points, [left + 6, right])}
            y={labels[index]}
            dy="0.32em"
          >
            {label}
          </text>
        </g>
      ))}
    </g>
  );
}
