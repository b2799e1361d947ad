'use client';
import { type KeyboardEvent, type PointerEvent, type ReactNode, useCallback, useMemo, useState } from 'react';
import { useCanvas } from '../canvas/use-canvas.ts';
import { useTokens } from '../canvas/use-tokens.ts';
import { useWidth } from '../use-width.ts';
import { drawWindows, WINDOW_TOKENS, type WindowCell } from './draw-windows.ts';
import styles from './start-end.module.css';
import { hitWindow, layOutWindows, windowAfterKey, type YearWindow } from './window-grid.ts';

interface Props {
  /** low-flow years, rising */
  starts: readonly number[];
  ends: readonly number[];
  /** what a window's cell shows; null where it has no answer. Keep it between renderings: a new one draws anew */
  cellAt(window: YearWindow): WindowCell | null;
  /** what a window says, shown and spoken */
  wordsOf(window: YearWindow): ReactNode;
  /** what stands there while no window is read */
  hint: ReactNode;
  /** the window that the page's other figures are of */
  whole: YearWindow | null;
  label: string;
  /** what a click or Enter does with a window */
  onUse?(window: YearWindow): void;
}

const FOCUSABLE = { tabIndex: 0 };

/** The start–end chart: the trend of every start year and end year on one canvas. The pointer or the arrow keys read a
 *  window. Give its figures as a table or file beside it. */
export function StartEndFigure({ starts, ends, cellAt, wordsOf, hint, whole, label, onUse }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(760);
  const [cursor, setCursor] = useState<YearWindow | null>(null);
  const grid = useMemo(() => layOutWindows(starts, ends, width), [starts, ends, width]);
  const palette = useTokens(WINDOW_TOKENS);
  const draw = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (grid && palette) drawWindows(context, { grid, cellAt, cursor, whole }, palette);
    },
    [grid, palette, cellAt, cursor, whole],
  );
  const { canvas } = useCanvas(grid?.width ?? 1, grid?.height ?? 1, draw);
  if (!grid) return null;

  const has = (window: YearWindow) => cellAt(window) !== null;
  const windowOf = (event: { clientX: number; clientY: number; currentTarget: Element }) => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    const window = hitWindow(grid, event.clientX - left, event.clientY - top);
    return window && has(window) ? window : null;
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    if (event.key === 'Escape') setCursor(null);
    else if (event.key === 'Enter' && cursor && onUse) onUse(cursor);
    else {
      const next = windowAfterKey(grid, has, cursor, event.key);
      if (!next) return;
      setCursor(next);
    }
    event.preventDefault();
  };
  const read = (event: PointerEvent) => setCursor(windowOf(event));

  return (
    <div ref={frame} className={styles.figure}>
      <p className={styles.readout} role="status">
        {cursor ? wordsOf(cursor) : hint}
      </p>
      <p className={styles.axis} aria-hidden="true">
        End year across, start year down
      </p>
      <div className={styles.scroll}>
        <div
          role="application"
          aria-label={`${label} Arrow keys move: left and right the end year, up and down the start year.`}
          {...FOCUSABLE}
          className={styles.plot}
          style={{ inlineSize: grid.width, blockSize: grid.height }}
          onPointerMove={read}
          onPointerDown={read}
          onPointerLeave={(event) => event.pointerType !== 'touch' && setCursor(null)}
          onClick={(event) => {
            const window = windowOf(event);
            if (window && onUse) onUse(window);
          }}
          onKeyDown={onKeyDown}
        >
          <canvas ref={canvas} style={{ inlineSize: grid.width, blockSize: grid.height }} />
        </div>
      </div>
    </div>
  );
}
