'use client';
import { type RefObject, useEffect, useRef } from 'react';

/** Draws in CSS pixels on a cleared canvas. */
export type Draw = (context: CanvasRenderingContext2D, width: number, height: number) => void;

/** A canvas that is as sharp as the screen, drawn anew when `draw`, its size or the screen's density changes.
 *  @param draw  keep it between renderings (useCallback): a new one draws anew
 *  @returns     the canvas's ref, and a function that draws before the next frame, however often it is called */
export function useCanvas(
  width: number,
  height: number,
  draw: Draw,
): { canvas: RefObject<HTMLCanvasElement | null>; redraw: () => void } {
  const canvas = useRef<HTMLCanvasElement | null>(null);
  const frame = useRef(0);
  const latest = useRef(() => {});
  const redraw = useRef(() => {
    if (frame.current === 0) frame.current = requestAnimationFrame(() => latest.current());
  }).current;
  useEffect(() => {
    latest.current = () => {
      frame.current = 0;
      if (canvas.current) paint(canvas.current, width, height, draw);
    };
    redraw();
  }, [width, height, draw, redraw]);
  useEffect(() => {
    const stopDensity = onDensityChange(redraw);
    // no frame comes before the page is printed
    const drawNow = () => latest.current();
    window.addEventListener('beforeprint', drawNow);
    void document.fonts.ready.then(redraw);
    return () => {
      stopDensity();
      window.removeEventListener('beforeprint', drawNow);
      cancelAnimationFrame(frame.current);
      frame.current = 0;
    };
  }, [redraw]);
  return { canvas, redraw };
}

function paint(canvas: HTMLCanvasElement, width: number, height: number, draw: Draw): void {
  const ratio = window.devicePixelRatio || 1;
  const [wide, high] = [Math.round(width * ratio), Math.round(height * ratio)];
  if (canvas.width !== wide || canvas.height !== high) {
    canvas.width = wide;
    canvas.height = high;
  }
  const context = canvas.getContext('2d');
  if (!context) return;
  context.setTransform(ratio, 0, 0, ratio, 0, 0);
  context.clearRect(0, 0, width, height);
  draw(context, width, height);
}

/** Calls back when the window moves to a screen of another density or the page is zoomed. */
function onDensityChange(listener: () => void): () => void {
  let query = matchMedia(`(resolution: ${window.devicePixelRatio}dppx)`);
  const onChange = () => {
    query.removeEventListener('change', onChange);
    query = matchMedia(`(resolution: ${window.devicePixelRatio}dppx)`);
    query.addEventListener('change', onChange);
    listener();
  };
  query.addEventListener('change', onChange);
  return () => query.removeEventListener('change', onChange);
}
