import Link from 'next/link';
import type { FigureCurve } from './duration-figure';
import styles from './duration-figure.module.css';
import type { LineEnd, PlotBox } from './lay-out';
import { lineLook } from './line-looks';

interface Props {
  lines: readonly FigureCurve[];
  ends: readonly (LineEnd | null)[];
  plot: PlotBox;
  width: number;
  near: string | null;
  compact: boolean;
}

/** Names at the ends of their lines, each with a thin lead back to its line. Each opens its station. */
export function EndLabels({ lines, ends, plot, width, near, compact }: Props) {
  return (
    <>
      <svg className={styles.leads} width={width} height="100%" aria-hidden="true">
        {lines.map((line, index) => {
          const end = ends[index];
          if (!end) return null;
          const { colour } = lineLook(index);
          return (
            <path
              key={line.code}
              d={`M${end.x + 2},${end.y}H${Math.max(end.x + 2, plot.right + 3)}L${plot.right + 12},${end.labelY}`}
              stroke={colour}
              fill="none"
              strokeOpacity={0.7}
            />
          );
        })}
      </svg>
      <ul className={styles.labels} aria-label="Stations in the figure">
        {lines.map((line, index) => {
          const end = ends[index];
          if (!end) return null;
          return (
            <li key={line.code} style={{ left: plot.right + 15, top: end.labelY, right: 0 }}>
              <Link
                href={line.href}
                prefetch={false}
                title={line.name}
                style={{ color: lineLook(index).colour }}
                data-near={near === line.code || undefined}
                aria-label={compact ? `${index + 1}: ${line.name}` : undefined}
              >
                {compact ? index + 1 : line.name}
              </Link>
            </li>
          );
        })}
      </ul>
    </>
  );
}
