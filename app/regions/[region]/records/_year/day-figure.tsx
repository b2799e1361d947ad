'use client';
import { type KeyboardEvent, type PointerEvent, useCallback, useMemo, useRef, useState } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import type { MarkedChange } from '@/app/components/change-marks/marked-changes';
import { useWidth } from '@/app/components/use-width';
import { isoDate } from '@/lib/calendar/day';
import { useChartPalette } from '../_chart/chart-palette.ts';
import { dayAt, layOutDays } from './day-layout.ts';
import { type DayColumns, dayWords } from './days-answer.ts';
import { drawDays, type Lane } from './draw-days.ts';
import { type FlowAxisKind, flowAxis } from './flow-axis.ts';
import styles from './year-panel.module.css';

export type DaySpan = readonly [first: number, last: number];

interface Props {
  label: string;
  columns: DayColumns;
  lanes: readonly Lane[];
  /** dated changes of the station, drawn where they fall into the year */
  changes: readonly MarkedChange[];
  season: DaySpan | null;
  kind: FlowAxisKind;
  flowText(value: number): string;
  selection: DaySpan | null;
  onSelect(span: DaySpan | null): void;
}

const FOCUSABLE = { tabIndex: 0 };

/** A year's daily flows with what is said of them in lanes below. The pointer or the arrow keys read a day; a drag, or
 *  Shift with the arrow keys, chooses a stretch. */
export function DayFigure({ label, columns, lanes, changes, season, kind, flowText, selection, onSelect }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(960);
  const [cursor, setCursor] = useState<number | null>(null);
  const dragged = useRef<number | null>(null);
  const anchor = useRef<number | null>(null);
  const { first, values } = columns;
  const days = values.length;
  const layout = useMemo(() => layOutDays(width, first, days, lanes.length), [width, first, days, lanes.length]);
  const axis = useMemo(() => flowAxis(values, kind, layout.floor - layout.top), [values, kind, layout]);
  const palette = useChartPalette();
  const draw = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (palette) drawDays(context, { layout, columns, axis, lanes, changes, season, cursor, selection }, palette);
    },
    [palette, layout, columns, axis, lanes, changes, season, cursor, selection],
  );
  const { canvas } = useCanvas(width, layout.height, draw);

  const dayOf = (event: PointerEvent) =>
    dayAt(layout, event.clientX - event.currentTarget.getBoundingClientRect().left);
  const select = (from: number, to: number) => onSelect(from <= to ? [from, to] : [to, from]);
  const onPointerDown = (event: PointerEvent) => {
    // a finger scrolls the page; it chooses days by the two date fields
    if (event.pointerType === 'touch' || event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    dragged.current = dayOf(event);
  };
  const onPointerMove = (event: PointerEvent) => {
    const day = dayOf(event);
    setCursor(day);
    if (dragged.current !== null && dragged.current !== day) select(dragged.current, day);
  };
  const onPointerUp = (event: PointerEvent) => {
    if (dragged.current !== null && dragged.current === dayOf(event)) onSelect(null);
    dragged.current = null;
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const step = { ArrowLeft: -1, ArrowRight: 1, PageUp: -30, PageDown: 30, Home: -days, End: days }[event.key];
    if (event.key === 'Escape' && selection) onSelect(null);
    else if (step === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
    else {
      const from = cursor ?? (step > 0 ? first - 1 : first + days);
      const day = Math.min(first + days - 1, Math.max(first, from + step));
      if (event.shiftKey) {
        anchor.current ??= cursor ?? day;
        select(anchor.current, day);
      } else anchor.current = null;
      setCursor(day);
    }
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    <div ref={frame} className={styles.figure}>
      <div
        role="application"
        aria-label={label}
        {...FOCUSABLE}
        className={styles.plot}
        onPointerDown={onPointerDown}
        onPointerMove={onPointerMove}
        onPointerUp={onPointerUp}
        onPointerLeave={() => setCursor(null)}
        onKeyDown={onKeyDown}
      >
        <canvas ref={canvas} style={{ inlineSize: width, blockSize: layout.height, display: 'block' }} />
      </div>
      <p className={styles.readout} role="status" data-testid="day-readout">
        {cursor !== null && cursor >= first && cursor < first + days
          ? dayWords(columns, cursor, flowText)
          : selection
            ? `${isoDate(selection[0])} to ${isoDate(selection[1])} chosen`
            : 'Point at a day, or move with the arrow keys; drag, or hold Shift, to choose a stretch.'}
      </p>
    </div>
  );
}
