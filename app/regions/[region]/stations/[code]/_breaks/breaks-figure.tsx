'use client';
import { scaleLinear } from 'd3-scale';
import { useWidth } from '@/app/components/use-width';
import { yearTicks } from '@/app/components/year-ticks';
import type { StationBreaks } from '@/lib/region/break-types';
import { axisTicks, type IndexScale } from '../index-scale';
import { FootAxis, ValueAxis } from '../plot-axes';
import { PLOT } from '../plot-box';
import { placeLabels } from './break-labels.ts';
import styles from './breaks-figure.module.css';

export interface BreaksData {
  years: readonly number[];
  /** what is compared, one a year, in its own unit */
  values: readonly number[];
  scale: IndexScale;
  /** first and last year of the page's time axis */
  span: [number, number];
}

interface Props {
  data: BreaksData;
  breaks: Pick<StationBreaks, 'segments' | 'steps' | 'suggested'>;
  labelOf(year: number): string;
}

const HEIGHT = 240;
const SUGGESTED = 'suggested, not tested';
/** Room for the words of a break and of the suggested one, pixels. */
const LABEL = 82;
const HINT = 128;

/** Annual figures with the median of each part as a level, the breaks between them, and the one that the data suggest.
 *  Decoration beside the table, which says the same. */
export function BreaksFigure({ data, breaks, labelOf }: Props) {
  const { years, values, scale, span } = data;
  const { factor, unit } = scale;
  const [frame, width] = useWidth<HTMLDivElement>(960);
  if (years.length === 0) return null;
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const x = scaleLinear([span[0] - 0.7, span[1] + 0.7], [PLOT.left, right]);
  const shown = values.map((value) => value * factor);
  // dates have no zero to start from
  const zeroBased = scale.index !== 'minimum-date';
  const low = zeroBased ? Math.min(0, ...shown) : Math.min(...shown) - 20;
  const { segments, steps, suggested } = breaks;
  const labels = placeLabels(
    steps.map(({ break: { year } }) => x(year - 0.5)),
    LABEL,
    right,
  );
  const top = PLOT.top + (labels.length === 0 ? 0 : 15 * (1 + Math.max(...labels.map(({ row }) => row))));
  const [hint] = placeLabels(suggested ? [x(suggested.lastBefore + 0.5)] : [], HINT, right);
  const y = scaleLinear([low, Math.max(low + 1e-9, ...shown)], [HEIGHT - PLOT.bottom, top]);
  if (zeroBased) y.nice(5);
  const bottom = HEIGHT - PLOT.bottom;
  return (
    <div ref={frame} className={styles.frame}>
      <svg
        width={width}
        height={HEIGHT}
        role="img"
        aria-label={`Levels of ${segments.length || 1} part${segments.length > 1 ? 's' : ''} of the years${unit && `, ${unit}`}. The table below says the same.`}
      >
        <ValueAxis ticks={axisTicks(y, scale)} y={y} right={right} zero={zeroBased ? 0 : undefined} />
        <FootAxis values={yearTicks(span[0], span[1], right - PLOT.left)} x={x} bottom={bottom} />
        {shown.map((value, i) => (
          <circle key={years[i]} className={styles.value} cx={x(years[i])} cy={y(value)} r={2.6} />
        ))}
        {suggested && (
          <g className={styles.suggested}>
            <line x1={x(suggested.lastBefore + 0.5)} x2={x(suggested.lastBefore + 0.5)} y1={top} y2={bottom} />
            <text x={hint.x} textAnchor={hint.textAnchor} y={bottom - 6}>
              {SUGGESTED}
            </text>
          </g>
        )}
        {steps.map(({ break: { year } }, i) => (
          <g key={year} className={styles.break}>
            <line x1={x(year - 0.5)} x2={x(year - 0.5)} y1={top - 15 * labels[i].row - 14} y2={bottom} />
            <text x={labels[i].x} textAnchor={labels[i].textAnchor} y={top - 4 - 15 * labels[i].row}>
              from {labelOf(year)}
            </text>
          </g>
        ))}
        {segments.map(({ first, last, median }) =>
          median === null ? null : (
            <line
              key={first}
              className={styles.level}
              x1={Math.max(PLOT.left, x(first - 0.5))}
              x2={Math.min(right, x(last + 0.5))}
              y1={y(median * factor)}
              y2={y(median * factor)}
            />
          ),
        )}
      </svg>
      <p className={styles.key}>
        <span>
          <svg width="18" height="8" aria-hidden="true">
            <line className={styles.level} x1="0" x2="18" y1="4" y2="4" />
          </svg>{' '}
          median of the years between breaks{unit && `, ${unit}`}
        </span>
      </p>
    </div>
  );
}
