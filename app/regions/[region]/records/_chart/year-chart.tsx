'use client';
import {
  type KeyboardEvent,
  type MouseEvent,
  type PointerEvent,
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
} from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { changeText } from '@/app/components/change-marks/marked-changes';
import { count, type Units } from '@/app/components/format';
import type { RegionRecords } from '@/lib/jobs/records-types';
import { type CellPlace, cellAfterKey, hitCell, layOutChart, scrollToCell } from './chart-layout.ts';
import { ChartLegend } from './chart-legend.tsx';
import { useCellLook } from './draw-cell.ts';
import { drawChart } from './draw-chart.ts';
import { sortFigure } from './sort-figure.ts';
import type { Sort, Sorted } from './sort-stations.ts';
import { useBoxSize } from './use-box-size.ts';
import { cellWords, changesIn, yearCell } from './year-cell.ts';
import styles from './year-chart.module.css';

interface Props {
  records: RegionRecords;
  span: [number, number];
  rows: readonly Sorted[];
  sort: Sort;
  units: Units;
  /** the year whose panel is open; a station without a year is brought into sight */
  open: { station: string | null; year: number | null };
  onOpen(code: string, year: number): void;
}

const FOCUSABLE = { tabIndex: 0 };

/** All stations by all years on one canvas that shows the part scrolled to. The pointer or the arrow keys move a cell
 *  cursor, whose counts stand above; a click or Enter opens the year. */
export function YearChart({ records, span, rows, sort, units, open, onOpen }: Props) {
  const [box, size] = useBoxSize({ width: 960, height: 480 });
  const [pointed, setPointed] = useState<{ code: string; year: number } | null>(null);
  const scroll = useRef({ left: 0, top: 0 });
  const [first, last] = span;
  const layout = useMemo(
    () => layOutChart(size.width, rows.length, first, last),
    [size.width, rows.length, first, last],
  );
  const figures = useMemo(() => rows.map((row) => sortFigure(row, sort, units)), [rows, sort, units]);
  // how each row's name was cut to fit, for as long as rows and room stay
  const names = useMemo(() => figures.map(() => ({ text: '', width: -1 })), [figures]);
  const lookOf = useCellLook();
  const rowOf = useMemo(() => new Map(rows.map(({ station }, row) => [station.code, row])), [rows]);
  const openRow = open.station === null ? -1 : (rowOf.get(open.station) ?? -1);
  const cursorRow = pointed === null ? undefined : rowOf.get(pointed.code);
  const cursor = useMemo(
    () => (pointed && cursorRow !== undefined ? { row: cursorRow, year: pointed.year } : null),
    [pointed, cursorRow],
  );
  // years that do not fit are looked at from the latest on
  const isWide = layout.width > size.width;
  useEffect(() => {
    if (isWide && box.current) box.current.scrollLeft = box.current.scrollWidth;
  }, [isWide, box]);

  const setCursor = (place: CellPlace | null) =>
    setPointed((now) => {
      if (place === null) return null;
      const { code } = rows[place.row].station;
      return now?.code === code && now.year === place.year ? now : { code, year: place.year };
    });

  const draw = useCallback(
    (context: CanvasRenderingContext2D, width: number, height: number) => {
      if (!lookOf) return;
      const opened = openRow >= 0 && open.year !== null ? { row: openRow, year: open.year } : null;
      const picture = { layout, records, rows, figures, names, cursor, open: opened, scroll: scroll.current };
      drawChart(context, picture, lookOf(context), width, height);
    },
    [lookOf, layout, records, rows, figures, names, cursor, openRow, open.year],
  );
  const { canvas, redraw } = useCanvas(size.width, size.height, draw);

  const bringIntoSight = useCallback(
    (place: CellPlace) => {
      const element = box.current;
      if (!element) return;
      const to = scrollToCell(layout, place, size, { left: element.scrollLeft, top: element.scrollTop });
      element.scrollTo(to.left, to.top);
    },
    [box, layout, size],
  );
  useEffect(() => {
    if (openRow >= 0) bringIntoSight({ row: openRow, year: open.year ?? last });
  }, [openRow, open.year, last, bringIntoSight]);

  const placeOf = (event: MouseEvent | PointerEvent) => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    return hitCell(layout, event.clientX - left, event.clientY - top, scroll.current);
  };
  const onPointerMove = (event: PointerEvent) => {
    if (event.pointerType === 'touch') return;
    setCursor(placeOf(event));
  };
  const openPlace = (place: CellPlace | null) => {
    if (place) onOpen(rows[place.row].station.code, place.year);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.altKey || event.metaKey) return;
    if (event.key === 'Enter' || event.key === ' ') openPlace(cursor);
    else if (event.key === 'Escape') setCursor(null);
    else {
      const page = Math.max(1, Math.floor((size.height - layout.axis) / layout.rowHeight) - 1);
      const from = cursor ?? (openRow >= 0 ? { row: openRow, year: open.year ?? last } : null);
      const next = cellAfterKey(layout, from, event.key, { page, whole: event.ctrlKey });
      if (!next) return;
      setCursor(next);
      bringIntoSight(next);
    }
    event.preventDefault();
  };

  const station = cursor && rows[cursor.row].station;
  const cell = station && cursor && yearCell(records, station, cursor.year);
  const changed = station && cursor ? changesIn(station, cursor.year, records.basis.yearStart) : [];
  return (
    <div className={styles.frame}>
      <p className={styles.readout} role="status" data-testid="year-readout">
        {station && cursor ? (
          <>
            <strong>{station.name}</strong>
            {station.river && `, ${station.river}`} ({station.code}) ·{' '}
            {cell ? cellWords(cell, records.basis.yearStart) : `${cursor.year}: outside the record`}
            {changed.map((change) => (
              <span key={change.letter}> · {changeText(change)}</span>
            ))}
          </>
        ) : (
          'Point at a year, or move with the arrow keys, for its counts; a click, a tap or Enter opens it.'
        )}
      </p>
      <div
        ref={box}
        className={styles.box}
        style={{ blockSize: `min(${layout.height + 2}px, max(15rem, 100dvh - 19rem))` }}
        role="application"
        aria-label={`Chart of ${count(rows.length, 'station')} by years ${first} to ${last}. Arrow keys move from cell to cell, Enter opens the year. The table below holds the same.`}
        {...FOCUSABLE}
        onScroll={(event) => {
          scroll.current = { left: event.currentTarget.scrollLeft, top: event.currentTarget.scrollTop };
          redraw();
        }}
        onPointerMove={onPointerMove}
        onPointerLeave={() => setCursor(null)}
        onClick={(event) => openPlace(placeOf(event))}
        onKeyDown={onKeyDown}
      >
        <div style={{ inlineSize: layout.width, blockSize: layout.height }}>
          <canvas ref={canvas} className={styles.canvas} style={{ inlineSize: size.width, blockSize: size.height }} />
        </div>
      </div>
      <ChartLegend />
    </div>
  );
}
