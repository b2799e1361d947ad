'use client';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { useAnswer } from '@/app/components/use-answer';
import { isoDate, parseIsoDate } from '@/lib/calendar/day';
import type { FindingRow } from '@/lib/jobs/records-types';
import { type ChartPalette, useChartPalette } from '../_chart/chart-palette.ts';
import { type DayColumns, type DaysAnswer, dayColumns } from '../_year/days-answer.ts';
import { type FlowAxis, flowAxis } from '../_year/flow-axis.ts';
import styles from './findings.module.css';
import { surroundings } from './group-findings.ts';

interface Props {
  slug: string;
  finding: FindingRow;
  version: number;
}

const WIDTH = 260;
const HEIGHT = 56;

/** The stretch with the days around it, drawn once it comes into sight. */
export function FindingSketch({ slug, finding, version }: Props) {
  const [frame, seen] = useSeen();
  const { code, kind, first, last } = finding;
  const [from, to] = surroundings(kind, parseIsoDate(first), parseIsoDate(last));
  const address = `/api/regions/${encodeURIComponent(slug)}/stations/${encodeURIComponent(code)}/days?first=${isoDate(from)}&last=${isoDate(to)}`;
  const { value, problem } = useAnswer<DaysAnswer>(seen ? address : null, version);
  const columns = useMemo(() => dayColumns(value, from, to), [value, from, to]);
  const axis = useMemo(() => flowAxis(columns.values, 'log', HEIGHT - 8), [columns]);
  const palette = useChartPalette();
  const draw = useCallback(
    (context: CanvasRenderingContext2D) => {
      const stretch: [number, number] = [parseIsoDate(first), parseIsoDate(last)];
      if (palette) drawSketch(context, { columns, axis, stretch }, palette);
    },
    [palette, columns, axis, first, last],
  );
  const { canvas } = useCanvas(WIDTH, HEIGHT, draw);
  return (
    <div ref={frame} className={styles.sketch} title={`${isoDate(from)} to ${isoDate(to)}, logarithmic`}>
      {problem ? (
        <span className={styles.who}>{problem}</span>
      ) : (
        <canvas ref={canvas} style={{ inlineSize: WIDTH, blockSize: HEIGHT }} />
      )}
    </div>
  );
}

interface Sketch {
  columns: DayColumns;
  axis: FlowAxis;
  stretch: [number, number];
}

function drawSketch(
  context: CanvasRenderingContext2D,
  { columns, axis, stretch }: Sketch,
  palette: ChartPalette,
): void {
  const { first, values } = columns;
  const x = (day: number) => ((day - first) / values.length) * WIDTH;
  const [from, to] = [x(stretch[0]), Math.max(x(stretch[0]) + 3, x(stretch[1] + 1))];
  context.fillStyle = palette.wash;
  context.fillRect(from, 0, to - from, HEIGHT);
  context.fillStyle = palette.alert;
  context.fillRect(from, HEIGHT - 3, to - from, 3);
  context.beginPath();
  let open = false;
  for (let at = 0; at < values.length; at++) {
    if (Number.isNaN(values[at])) {
      open = false;
      continue;
    }
    const y = 2 + axis.y(values[at]);
    if (!open) context.moveTo(x(first + at), y);
    context.lineTo(x(first + at + 1), y);
    open = true;
  }
  context.strokeStyle = palette.ink;
  context.lineWidth = 1.25;
  context.stroke();
}

/** True from the time the element first comes near the screen: what nobody looks at is not asked for. */
function useSeen() {
  const ref = useRef<HTMLDivElement | null>(null);
  const [seen, setSeen] = useState(false);
  useEffect(() => {
    const element = ref.current;
    if (!element || seen) return;
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) setSeen(true);
      },
      { rootMargin: '200px' },
    );
    observer.observe(element);
    return () => observer.disconnect();
  }, [seen]);
  return [ref, seen] as const;
}
