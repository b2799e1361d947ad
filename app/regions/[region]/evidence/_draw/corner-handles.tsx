'use client';
import { type KeyboardEvent, type PointerEvent, useEffect, useRef } from 'react';
import { fixed } from '@/app/components/format';
import type { Corner } from '@/lib/region/in-polygon';
import { withCornerAt, withoutCorner } from './edit-area.ts';
import styles from './group.module.css';
import { type MapFrame, toCorner, toPixels } from './map-frame.ts';

interface Props {
  frame: MapFrame;
  area: readonly Corner[];
  /** the corner that takes the focus next */
  focus: number | null;
  onFocused(): void;
  onArea(area: Corner[]): void;
}

/** Pixels that an arrow key moves a corner by; with Shift, one. */
const STEP = 8;
const MOVES: Record<string, [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** The corners of a drawn group as buttons that can be dragged, moved by arrow keys and deleted. */
export function CornerHandles({ frame, area, focus, onFocused, onArea }: Props) {
  const buttons = useRef(new Map<number, HTMLButtonElement>());
  const dragging = useRef<number | null>(null);
  useEffect(() => {
    if (focus === null) return;
    buttons.current.get(focus)?.focus();
    onFocused();
  }, [focus, onFocused]);

  const moveTo = (at: number, x: number, y: number) => {
    const inside = [Math.max(0, Math.min(frame.width, x)), Math.max(0, Math.min(frame.height, y))] as const;
    onArea(withCornerAt(area, at, toCorner(frame, ...inside)));
  };
  const onKeyDown = (event: KeyboardEvent, at: number) => {
    const move = MOVES[event.key];
    if (move) {
      const [x, y] = pixelsOf(frame, area[at]);
      const step = event.shiftKey ? 1 : STEP;
      moveTo(at, x + step * move[0], y + step * move[1]);
    } else if (event.key === 'Delete' || event.key === 'Backspace') {
      onArea(withoutCorner(area, at));
      buttons.current.get(at === 0 ? 1 : at - 1)?.focus();
    } else return;
    event.preventDefault();
  };
  const onPointerMove = (event: PointerEvent, at: number) => {
    if (dragging.current !== at) return;
    const map = event.currentTarget.parentElement?.getBoundingClientRect();
    if (map) moveTo(at, event.clientX - map.left, event.clientY - map.top);
  };

  // a corner is its place in the order, and keeps the focus while it is moved
  const places = Array.from(area, (_, at) => at);
  return places.map((at) => {
    const corner = area[at];
    const [x, y] = pixelsOf(frame, corner);
    return (
      <button
        key={at}
        ref={(button) => {
          if (button) buttons.current.set(at, button);
          else buttons.current.delete(at);
        }}
        type="button"
        className={styles.corner}
        style={{ insetInlineStart: x, insetBlockStart: y }}
        aria-label={`Corner ${at + 1} at longitude ${fixed(corner[0], 3)}, latitude ${fixed(corner[1], 3)}. Arrow keys move it, Delete removes it.`}
        onKeyDown={(event) => onKeyDown(event, at)}
        onPointerDown={(event) => {
          dragging.current = at;
          event.currentTarget.setPointerCapture(event.pointerId);
        }}
        onPointerMove={(event) => onPointerMove(event, at)}
        onPointerUp={() => {
          dragging.current = null;
        }}
        onPointerCancel={() => {
          dragging.current = null;
        }}
      />
    );
  });
}

const pixelsOf = (frame: MapFrame, [longitude, latitude]: Corner) => toPixels(frame, { longitude, latitude });
