'use client';
import { useCallback } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { drawCell, useCellLook } from './draw-cell.ts';
import type { YearCell } from './year-cell.ts';
import styles from './year-chart.module.css';

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

const ENTRIES: { words: string; cell: YearCell }[] = [
  { words: 'complete: the year counts', cell: WHOLE },
  {
    words: 'partly: filled as far as there are days, does not count',
    cell: { ...WHOLE, values: 170, state: 'partly' },
  },
  { words: 'no values', cell: { ...WHOLE, values: 0, state: 'none' } },
  { words: 'provisional days', cell: { ...WHOLE, state: 'partly', flagged: { ...NO_FLAGS, provisional: 366 } } },
  { words: 'suspect days, marked by a check', cell: { ...WHOLE, flagged: { ...NO_FLAGS, suspect: 1 } } },
  { words: 'days rejected by a person', cell: { ...WHOLE, flagged: { ...NO_FLAGS, rejected: 1 } } },
];

/** What the cells of the chart mean, drawn by the chart's own pen. */
export function ChartLegend() {
  return (
    <ul className={styles.legend} aria-label="What the cells mean">
      {ENTRIES.map(({ words, cell }) => (
        <li key={words}>
          <Swatch cell={cell} />
          {words}
        </li>
      ))}
    </ul>
  );
}

const WIDTH = 14;
const HEIGHT = 17;

function Swatch({ cell }: { cell: YearCell }) {
  const lookOf = useCellLook();
  const draw = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (lookOf) drawCell(context, cell, { x: 0, y: 0, width: WIDTH, height: HEIGHT }, lookOf(context));
    },
    [cell, lookOf],
  );
  const { canvas } = useCanvas(WIDTH, HEIGHT, draw);
  return <canvas ref={canvas} style={{ inlineSize: WIDTH, blockSize: HEIGHT }} />;
}
