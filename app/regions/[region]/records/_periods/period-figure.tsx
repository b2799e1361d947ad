'use client';
import { type KeyboardEvent, type MouseEvent, useCallback, useMemo, useState } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { range } from '@/app/components/format';
import { useWidth } from '@/app/components/use-width';
import type { CommonPeriods } from '@/lib/jobs/records-types';
import { useChartPalette } from '../_chart/chart-palette.ts';
import { drawPeriods, TONES } from './draw-periods.ts';
import { hitPeriod, layOutPeriods, periodAfterKey, periodCount, toneSteps } from './period-grid.ts';
import { kept } from './period-words.ts';
import styles from './periods.module.css';

interface Props {
  periods: CommonPeriods;
  current: readonly [number, number] | null;
  onUse(first: number, last: number): void;
}

const FOCUSABLE = { tabIndex: 0 };

/** Start years by end years on one canvas: the darker a cell, the more stations the period keeps. The pointer or the arrow
 *  keys read a period, a click or Enter makes it the basis's. */
export function PeriodFigure({ periods, current, onUse }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(960);
  const [cursor, setCursor] = useState<readonly [number, number] | null>(null);
  const layout = useMemo(() => layOutPeriods(periods, width), [periods, width]);
  const most = useMemo(() => periods.ranked.reduce((most, stations) => Math.max(most, stations), 0), [periods]);
  const steps = useMemo(() => toneSteps(most), [most]);
  const palette = useChartPalette();
  const draw = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (!layout || !palette) return;
      const { common } = periods;
      drawPeriods(context, { layout, periods, steps, cursor, current, common }, palette);
    },
    [palette, layout, periods, steps, cursor, current],
  );
  const { canvas } = useCanvas(layout?.width ?? 1, layout?.height ?? 1, draw);
  if (!layout) return null;

  const periodOf = (event: MouseEvent) => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    return hitPeriod(layout, event.clientX - left, event.clientY - top);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    if ((event.key === 'Enter' || event.key === ' ') && cursor) onUse(cursor[0], cursor[1]);
    else if (event.key === 'Escape') setCursor(null);
    else {
      const next = periodAfterKey(layout, cursor ?? startOf(current, periods), event.key);
      if (!next) return;
      setCursor(next);
    }
    event.preventDefault();
  };

  return (
    <div ref={frame} className={styles.figure}>
      <p className={styles.readout} role="status" data-testid="period-readout">
        {cursor ? (
          <>
            <strong>{range(cursor[0], cursor[1])}</strong>:{' '}
            {kept(periodCount(periods, cursor[0], cursor[1]), periods.stations)}
          </>
        ) : (
          'Point at a cell, or move with the arrow keys, for what the period keeps; a click or Enter makes it the basis’s.'
        )}
      </p>
      <div
        role="application"
        aria-label="Chart of start years by end years. Arrow keys move, Enter makes the period the basis’s. The list and the table below hold the same."
        {...FOCUSABLE}
        className={styles.plot}
        style={{ inlineSize: layout.width, blockSize: layout.height }}
        onPointerMove={(event) => setCursor(periodOf(event))}
        onPointerLeave={() => setCursor(null)}
        onClick={(event) => {
          const period = periodOf(event);
          if (period) onUse(period[0], period[1]);
        }}
        onKeyDown={onKeyDown}
      >
        <canvas ref={canvas} style={{ inlineSize: layout.width, blockSize: layout.height }} />
      </div>
      <ul className={styles.legend} aria-label="What the cells mean">
        {(most === 0 ? [] : steps).map((least, step) => (
          <li key={least}>
            <span className={styles.tone} aria-hidden="true">
              <span style={{ opacity: TONES[step] }} />
            </span>
            {range(least, (steps[step + 1] ?? most + 1) - 1).replace(/^(\d+)\u2013\1$/, '$1')}{' '}
            {step === 0 && (most === 1 ? 'station' : 'stations')}
          </li>
        ))}
        <li>
          <span className={styles.ringCommon} aria-hidden="true" /> the common period
        </li>
        <li>
          <span className={styles.ringCurrent} aria-hidden="true" /> the basis’s period
        </li>
      </ul>
    </div>
  );
}

/** Where the arrow keys begin: at the basis's period, where the chart has it. */
function startOf(current: readonly [number, number] | null, periods: CommonPeriods): readonly [number, number] | null {
  return current && periodCount(periods, current[0], current[1]) ? current : null;
}
