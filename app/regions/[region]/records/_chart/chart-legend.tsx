'use client';
import { useCallback } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { type CellLook, drawCell, drawChange, useCellLook } from './draw-cell.ts';
import type { YearCell } from './year-cell.ts';
import styles from './year-chart.module.css';

const WIDTH = 14;
const HEIGHT = 17;

const NO_FLAGS = { provisional: 0, estimated: 0, ice: 0, belowDetection: 0, suspect: 0, rejected: 0 };
const WHOLE: YearCell = {
  year: 2000,
  days: 366,
  values: 366,
  missing: 0,
  flagged: NO_FLAGS,
  state: 'counts',
  reason: '',
};

type Pen = (context: CanvasRenderingContext2D, look: CellLook) => void;

const penOf =
  (cell: YearCell): Pen =>
  (context, look) =>
    drawCell(context, cell, { x: 0, y: 0, width: WIDTH, height: HEIGHT }, look);

const ENTRIES: { words: string; draw: Pen }[] = [
  { words: 'complete: the year counts', draw: penOf(WHOLE) },
  {
    words: 'partly: filled as far as there are days, does not count',
    draw: penOf({ ...WHOLE, values: 170, state: 'partly' }),
  },
  { words: 'no values', draw: penOf({ ...WHOLE, values: 0, state: 'none' }) },
  { words: 'provisional days', draw: penOf({ ...WHOLE, state: 'partly', flagged: { ...NO_FLAGS, provisional: 366 } }) },
  { words: 'suspect days, marked by a check', draw: penOf({ ...WHOLE, flagged: { ...NO_FLAGS, suspect: 1 } }) },
  { words: 'days rejected by a person', draw: penOf({ ...WHOLE, flagged: { ...NO_FLAGS, rejected: 1 } }) },
  {
    words: 'dated change: a dam, a new weir, a moved gauge…',
    draw: (context, look) => drawChange(context, 4, [0, HEIGHT], look),
  },
];

/** What the cells of the chart mean, drawn by the chart's own pen. */
export function ChartLegend() {
  return (
    <ul className={styles.legend} aria-label="What the cells mean">
      {ENTRIES.map(({ words, draw }) => (
        <li key={words}>
          <Swatch draw={draw} />
          {words}
        </li>
      ))}
    </ul>
  );
}

function Swatch({ draw }: { draw(context: CanvasRenderingContext2D, look: CellLook): void }) {
  const lookOf = useCellLook();
  const paint = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (lookOf) draw(context, lookOf(context));
    },
    [draw, lookOf],
  );
  const { canvas } = useCanvas(WIDTH, HEIGHT, paint);
  return <canvas ref={canvas} style={{ inlineSize: WIDTH, blockSize: HEIGHT }} />;
}
