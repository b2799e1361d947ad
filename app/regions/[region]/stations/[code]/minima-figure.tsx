'use client';
import { scaleLinear } from 'd3-scale';
import { useMemo } from 'react';
import { ChangeMarks } from '@/app/components/change-marks/change-marks';
import {
  type MarkedChange,
  placeChanges,
  tabsHeight,
  yearPosition,
} from '@/app/components/change-marks/marked-changes';
import { LevelLines } from '@/app/components/level-lines/level-lines';
import { useWidth } from '@/app/components/use-width';
import { yearTicks } from '@/app/components/year-ticks';
import type { SlopeLine } from '@/lib/jobs/types';
import { axisTicks, type IndexScale } from './index-scale.ts';
import styles from './minima-figure.module.css';
import type { MinimaPoint } from './minima-points';
import type { NamedLevel } from './named-levels';
import { FootAxis, ValueAxis } from './plot-axes';
import { PLOT } from './plot-box';
import { readingText } from './reading-text';
import { SlopeBand, SlopeSample } from './slope-band';
import { YearFigure } from './year-figure';
import { useYearReader } from './year-reader';

interface Props {
  points: MinimaPoint[];
  slope: SlopeLine | null;
  trend: 'falling' | 'rising' | 'none' | null;
  scale: IndexScale;
  days: number;
  /** dated changes at the station, and the flows that mean something there */
  changes: readonly MarkedChange[];
  levels: readonly NamedLevel[];
  /** month in which the low-flow year begins */
  yearStart: number;
  /** first and last year of the axis, shared with the coverage strip below */
  span: [number, number];
  summary: string;
}

const HEIGHT = 340;

/** Annual minima, or another figure a year, on a real time axis: filled marks for the years used, hollow ones that hang
 *  from a bar for years whose minimum is only an upper bound, with the slope line and its interval. Arrow keys move
 *  through the years. */
export function MinimaFigure({ points, slope, trend, scale, days, changes, levels, yearStart, span, summary }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(960);
  const { x, y, marks, top } = useMemo(
    () => layOut({ points, slope, scale, changes, yearStart, span, width }),
    [points, slope, scale, changes, yearStart, span, width],
  );
  const { factor } = scale;
  const shown = levels.map(({ label, flow }) => ({ label, y: y(flow * factor) })).filter((level) => level.y >= top);
  const reader = useYearReader(points.map((point) => point.year));
  const current = points.find((point) => point.year === reader.picked) ?? null;

  const bottom = HEIGHT - PLOT.bottom;
  const zeroBased = scale.index !== 'minimum-date';
  return (
    <YearFigure
      {...{ frame, width, summary, span, reader }}
      height={HEIGHT}
      tone={trend === 'falling' ? 'dry' : trend === 'rising' ? 'wet' : 'none'}
      axisName={scale.axisName}
      text={current && readingText(current, scale, days)}
      yearAt={x.invert}
      meaning={<Key points={points} slope={slope} none={scale.none} />}
    >
      <ValueAxis ticks={axisTicks(y, scale)} y={y} right={width - PLOT.right} zero={zeroBased ? 0 : undefined} />
      <FootAxis values={yearTicks(span[0], span[1], width - PLOT.left - PLOT.right)} x={x} bottom={bottom} />
      <LevelLines
        levels={shown}
        left={PLOT.left}
        right={Math.max(PLOT.left, width - PLOT.right)}
        top={top + 6}
        bottom={bottom - 6}
        points={points.map(({ year, value }) => ({ x: x(year), y: y((value ?? 0) * factor) }))}
      />
      <ChangeMarks changes={marks} top={PLOT.top - 12} bottom={bottom} />
      {slope && (
        <SlopeBand slope={slope} x={x} y={(value) => y(value * factor)} top={0} bottom={zeroBased ? y(0) : bottom} />
      )}
      {current && <line className={styles.cursor} x1={x(current.year)} x2={x(current.year)} y1={top} y2={bottom} />}
      {points.map((point) => (
        <Mark key={point.year} point={point} x={x(point.year)} y={y((point.value ?? 0) * factor)} floor={bottom} />
      ))}
    </YearFigure>
  );
}

interface Contents extends Pick<Props, 'points' | 'slope' | 'scale' | 'changes' | 'yearStart' | 'span'> {
  width: number;
}

/** Scales, and the marks of the changes with the room that their letters take above the plot. */
function layOut({ points, slope, scale, changes, yearStart, span, width }: Contents) {
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const x = scaleLinear([span[0] - 0.7, span[1] + 0.7], [PLOT.left, right]);
  const marks = placeChanges(changes, (day) => x(yearPosition(day, yearStart)), [PLOT.left, right]);
  const top = PLOT.top + tabsHeight(marks);
  const values = [...points.flatMap(({ value }) => value ?? []), ...(slope?.fitted ?? [])].map(
    (value) => value * scale.factor,
  );
  const highest = Math.max(0, ...values);
  // dates have no zero to start from
  const domain = scale.index === 'minimum-date' ? aroundDates(values) : [0, highest || 1];
  const y = scaleLinear(domain, [HEIGHT - PLOT.bottom, top]);
  if (scale.index !== 'minimum-date') y.nice(5);
  return { x, y, marks, top };
}

/** Days of the year from well before the earliest to well after the latest date. */
function aroundDates(values: readonly number[]): [number, number] {
  if (values.length === 0) return [1, 365];
  return [Math.min(...values) - 20, Math.max(...values) + 20];
}

function Mark({ point, x, y, floor }: { point: MinimaPoint; x: number; y: number; floor: number }) {
  if (point.value === null) {
    return <path className={styles.absent} d={`M${x - 3},${floor - 3}l6,-6m0,6l-6,-6`} />;
  }
  if (!point.usable) {
    // A bar on top and a stalk down: the true minimum is here or lower. At zero there is no lower.
    const stalk = Math.min(9, floor - y);
    return (
      <g className={styles.atMost}>
        <path d={`M${x - 4},${y}h8${stalk < 5 ? '' : `M${x},${y}v${stalk}m-3,-3l3,3l3,-3`}`} />
      </g>
    );
  }
  return <circle className={point.used ? styles.used : styles.outside} cx={x} cy={y} r={4} />;
}

function Key({ points, slope, none }: { points: readonly MinimaPoint[]; slope: SlopeLine | null; none: string }) {
  return (
    <span className={styles.key}>
      {points.some((point) => point.used) && (
        <KeyItem shape={<circle className={styles.used} cx="7" cy="7" r="4" />} text="year used" />
      )}
      {points.some((point) => point.usable && !point.used && point.value !== null) && (
        <KeyItem shape={<circle className={styles.outside} cx="7" cy="7" r="4" />} text="usable, not used" />
      )}
      {points.some((point) => !point.usable && point.value !== null) && (
        <KeyItem
          shape={
            <g className={styles.atMost}>
              <path d="M3,3h8M7,3v8m-3,-3l3,3l3,-3" />
            </g>
          }
          text="at most: too much missing"
        />
      )}
      {points.some((point) => point.value === null) && (
        <KeyItem shape={<path className={styles.absent} d="M4,4l6,6m0,-6l-6,6" />} text={none} />
      )}
      {slope && <KeyItem shape={<SlopeSample />} text="slope with its 95 % interval" />}
    </span>
  );
}

function KeyItem({ shape, text }: { shape: React.ReactNode; text: string }) {
  return (
    <span>
      <svg width="14" height="14" aria-hidden="true">
        {shape}
      </svg>{' '}
      {text}
    </span>
  );
}
