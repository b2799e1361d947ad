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
import { tickText } from '@/app/components/duration-figure/figure-text';
import { useWidth } from '@/app/components/use-width';
import { yearTicks } from '@/app/components/year-ticks';
import type { SlopeLine } from '@/lib/jobs/types';
import { FootAxis, ValueAxis } from '../stations/[code]/plot-axes';
import { PLOT } from '../stations/[code]/plot-box';
import { SlopeBand } from '../stations/[code]/slope-band';
import { ByArrowKeys, YearFigure } from '../stations/[code]/year-figure';
import { useYearReader } from '../stations/[code]/year-reader';
import styles from './pair-figures.module.css';

export interface YearlyPoint {
  year: number;
  value: number;
  /** what is read out of it */
  text: string;
}

interface Props {
  points: readonly YearlyPoint[];
  slope: SlopeLine | null;
  tone: 'dry' | 'wet' | 'none';
  /** the level at which nothing differs, and what it is called */
  level: { value: number; text: string };
  axisName: string;
  changes: readonly MarkedChange[];
  yearStart: number;
  summary: string;
}

const HEIGHT = 280;

/** One figure a year on a real time axis, joined where years follow one another, with its slope line and interval. */
export function YearlyFigure({ points, slope, tone, level, axisName, changes, yearStart, summary }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(760);
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const bottom = HEIGHT - PLOT.bottom;
  const span: [number, number] = [points[0].year, points[points.length - 1].year];
  const { x, y, marks, top } = useMemo(() => {
    const x = scaleLinear([span[0] - 0.7, span[1] + 0.7], [PLOT.left, right]);
    const marks = placeChanges(changes, (day) => x(yearPosition(day, yearStart)), [PLOT.left, right]);
    const top = PLOT.top + tabsHeight(marks);
    const values = [0, level.value, ...points.map(({ value }) => value), ...(slope?.fitted ?? [])];
    const y = scaleLinear([Math.min(...values), Math.max(...values)], [bottom, top]).nice(5);
    return { x, y, marks, top };
  }, [points, slope, level.value, changes, yearStart, right, bottom, span[0], span[1]]);
  const reader = useYearReader(points.map(({ year }) => year));
  const current = points.find(({ year }) => year === reader.picked) ?? null;

  return (
    <YearFigure
      {...{ frame, width, summary, reader }}
      height={HEIGHT}
      tone={tone}
      axisName={axisName}
      span={span}
      text={current?.text ?? null}
      yearAt={(pixels) => x.invert(pixels)}
      meaning={
        <>
          Thick line: slope with its 95 % interval. Dashed: {level.text}. <ByArrowKeys />
        </>
      }
    >
      <ValueAxis
        ticks={y.ticks(5).map((value) => ({ value, text: tickText(value).replace('-', '−') }))}
        y={y}
        right={right}
      />
      <FootAxis values={yearTicks(span[0], span[1], right - PLOT.left)} x={x} bottom={bottom} />
      <line className={styles.level} x1={PLOT.left} x2={right} y1={y(level.value)} y2={y(level.value)} />
      <ChangeMarks changes={marks} top={PLOT.top - 12} bottom={bottom} />
      {slope && <SlopeBand slope={slope} x={x} y={y} top={top} bottom={bottom} />}
      {runsOf(points).map((run) => (
        <path
          key={run[0].year}
          className={styles.joined}
          d={`M${run.map(({ year, value }) => `${x(year).toFixed(1)},${y(value).toFixed(1)}`).join('L')}`}
        />
      ))}
      {current && <line className={styles.cursor} x1={x(current.year)} x2={x(current.year)} y1={top} y2={bottom} />}
      {points.map(({ year, value }) => (
        <circle key={year} className={styles.point} cx={x(year)} cy={y(value)} r={year === current?.year ? 5 : 3.25} />
      ))}
    </YearFigure>
  );
}

/** Years that follow one another, as runs. */
function runsOf(points: readonly YearlyPoint[]): YearlyPoint[][] {
  const runs: YearlyPoint[][] = [];
  points.forEach((point, i) => {
    if (i === 0 || point.year !== points[i - 1].year + 1) runs.push([]);
    runs[runs.length - 1].push(point);
  });
  return runs;
}
