import { useMemo } from 'react';
import { type ChartPalette, useChartPalette } from './chart-palette.ts';
import type { YearCell } from './year-cell.ts';

export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** Draws one year of a record, told apart by shape as well as by tone: filled from below by the share of days with a
 *  value, dark where the year counts, light under a line where it does not; a short stroke where there is no value;
 *  hatched as far as days are provisional; an orange corner for suspect days, a cross for rejected ones. */
export function drawCell(context: CanvasRenderingContext2D, cell: YearCell, box: Box, look: CellLook): void {
  const { palette } = look;
  const base = box.y + box.height;
  if (cell.state === 'none') {
    context.fillStyle = palette.edge;
    context.fillRect(box.x + box.width * 0.25, base - 1.5, Math.max(1, box.width * 0.5), 1.5);
  } else {
    const height = Math.max(2, Math.min(1, cell.values / cell.days) * box.height);
    context.fillStyle = cell.state === 'counts' ? palette.full : palette.part;
    context.fillRect(box.x, base - height, box.width, height);
    if (cell.flagged.provisional > 0) {
      const hatched = Math.max(2, Math.min(1, cell.flagged.provisional / cell.days) * box.height);
      context.fillStyle = look.hatch;
      context.fillRect(box.x, base - height, box.width, hatched);
    }
    if (cell.state === 'partly') {
      context.fillStyle = palette.ink3;
      context.fillRect(box.x, base - height, box.width, 1);
    }
  }
  if (cell.flagged.suspect > 0) drawCorner(context, box, palette);
  if (cell.flagged.rejected > 0) drawCross(context, box, palette);
}

/** A dated change of the river or the gauge: a stroke down the row under a flag, both rimmed with paper.
 *  @param row  upper edge and height of the row */
export function drawChange(
  context: CanvasRenderingContext2D,
  x: number,
  [y, height]: [number, number],
  look: CellLook,
) {
  const { palette } = look;
  context.fillStyle = palette.paper;
  context.fillRect(x - 1.5, y, 4, height);
  context.fillRect(x - 1.5, y, 8, 8);
  context.fillStyle = palette.ink;
  context.fillRect(x - 0.5, y, 2, height);
  context.beginPath();
  context.moveTo(x - 0.5, y);
  context.lineTo(x + 6, y + 3.25);
  context.lineTo(x - 0.5, y + 6.5);
  context.closePath();
  context.fill();
}

export interface CellLook {
  palette: ChartPalette;
  hatch: CanvasPattern | string;
}

/** @param ratio  device pixels per CSS pixel: a pattern is not scaled with the canvas' own unit */
function cellLook(palette: ChartPalette, ratio: number): CellLook {
  const size = Math.max(4, Math.round(4 * ratio));
  const tile = document.createElement('canvas');
  tile.width = size;
  tile.height = size;
  const pen = tile.getContext('2d');
  if (!pen) return { palette, hatch: palette.paper };
  pen.fillStyle = palette.paper;
  pen.fillRect(0, 0, size, size);
  pen.strokeStyle = palette.full;
  pen.lineWidth = size * 0.4;
  // three strokes, so that the diagonal goes on over the edges of the tile
  for (const shift of [-size, 0, size]) {
    pen.beginPath();
    pen.moveTo(shift, size);
    pen.lineTo(shift + size, 0);
    pen.stroke();
  }
  const hatch = pen.createPattern(tile, 'repeat');
  hatch?.setTransform(new DOMMatrix().scale(1 / ratio));
  return { palette, hatch: hatch ?? palette.paper };
}

/** The look in the theme that is shown, made once for each density of the screen; null before the page is there. */
export function useCellLook(): ((context: CanvasRenderingContext2D) => CellLook) | null {
  const palette = useChartPalette();
  return useMemo(() => {
    if (!palette) return null;
    const made = new Map<number, CellLook>();
    return (context) => {
      const ratio = context.getTransform().a;
      const look = made.get(ratio) ?? cellLook(palette, ratio);
      made.set(ratio, look);
      return look;
    };
  }, [palette]);
}

/** A triangle in the upper right corner, rimmed with paper so that it stands off from a full cell. */
function drawCorner(context: CanvasRenderingContext2D, box: Box, palette: ChartPalette): void {
  const side = Math.min(8, Math.max(4, box.width));
  const right = box.x + box.width;
  context.beginPath();
  context.moveTo(right - side, box.y);
  context.lineTo(right, box.y);
  context.lineTo(right, box.y + side);
  context.closePath();
  context.strokeStyle = palette.paper;
  context.lineWidth = 1.5;
  context.stroke();
  context.fillStyle = palette.alert;
  context.fill();
}

/** A cross at the foot, on paper. */
function drawCross(context: CanvasRenderingContext2D, box: Box, palette: ChartPalette): void {
  const half = Math.min(3.25, Math.max(2, box.width / 2 - 0.5));
  const x = box.x + box.width / 2;
  const y = box.y + box.height - half - 1.5;
  context.fillStyle = palette.paper;
  context.fillRect(x - half - 1, y - half - 1, 2 * half + 2, 2 * half + 2);
  context.strokeStyle = palette.ink;
  context.lineWidth = 1.5;
  context.beginPath();
  context.moveTo(x - half, y - half);
  context.lineTo(x + half, y + half);
  context.moveTo(x + half, y - half);
  context.lineTo(x - half, y + half);
  context.stroke();
}
