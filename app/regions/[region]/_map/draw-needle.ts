import { type Needle, sectorPath } from '@/app/components/needle';
import type { Palette } from './palette.ts';

/** Draws one mark: the canvas twin of app/components/needle-mark.tsx.
 *  @param radius of the disc, pixels; all else is in proportion to it */
export function drawNeedle(
  context: CanvasRenderingContext2D,
  needle: Needle,
  place: { x: number; y: number },
  radius: number,
  palette: Palette,
): void {
  const { x, y } = place;
  const ink = needle.kind === 'unranked' ? palette.level : palette[needle.side];
  const line = Math.max(1.1, radius * 0.28);
  const dx = Math.cos(needle.angle) * radius * 2.05;
  const dy = Math.sin(needle.angle) * radius * 2.05;

  if (needle.kind !== 'unranked') {
    // paper under the needle parts it from rivers and from other marks
    strokeLine(context, x - dx, y - dy, x + dx, y + dy, line * 1.3 + 2, palette.paper);
  }
  if (needle.share !== undefined) {
    strokeLine(context, x - dx, y - dy, x + dx, y + dy, line * 1.3, ink);
    drawShare(context, needle.share, { x, y }, radius * 1.1, { line, ink, paper: palette.paper });
    return;
  }
  outline(context, needle, x, y, radius);
  context.lineWidth = line + 2;
  context.strokeStyle = palette.paper;
  context.stroke();
  context.fillStyle = needle.significant ? ink : palette.paper;
  context.fill();
  context.lineWidth = line;
  context.strokeStyle = ink;
  if (needle.kind === 'unranked') context.setLineDash([radius * 0.42, radius * 0.36]);
  context.stroke();
  if (needle.kind === 'unranked') {
    context.setLineDash([]);
    return;
  }
  strokeLine(context, x - dx, y - dy, x + dx, y + dy, line * 1.3, ink);
  context.beginPath();
  context.arc(x, y, radius * 0.34, 0, 2 * Math.PI);
  context.fillStyle = needle.significant ? palette.paper : ink;
  context.fill();
}

/** A disc over the needle, filled from the top clockwise as far as its share goes. */
function drawShare(
  context: CanvasRenderingContext2D,
  share: number,
  place: { x: number; y: number },
  radius: number,
  { line, ink, paper }: { line: number; ink: string; paper: string },
): void {
  context.save();
  context.translate(place.x, place.y);
  context.beginPath();
  context.arc(0, 0, radius, 0, 2 * Math.PI);
  context.lineWidth = line + 2;
  context.strokeStyle = paper;
  context.stroke();
  context.fillStyle = paper;
  context.fill();
  context.lineWidth = line * 0.9;
  context.strokeStyle = ink;
  context.stroke();
  context.fillStyle = ink;
  context.fill(new Path2D(sectorPath(share, radius)));
  context.restore();
}

function outline(context: CanvasRenderingContext2D, needle: Needle, x: number, y: number, radius: number): void {
  context.beginPath();
  if (needle.kind === 'drying') {
    const half = radius * 1.3;
    context.moveTo(x, y - half);
    context.lineTo(x + half, y);
    context.lineTo(x, y + half);
    context.lineTo(x - half, y);
    context.closePath();
  } else {
    context.arc(x, y, radius, 0, 2 * Math.PI);
  }
}

function strokeLine(
  context: CanvasRenderingContext2D,
  x1: number,
  y1: number,
  x2: number,
  y2: number,
  width: number,
  colour: string,
): void {
  context.beginPath();
  context.moveTo(x1, y1);
  context.lineTo(x2, y2);
  context.lineWidth = width;
  context.strokeStyle = colour;
  context.lineCap = 'round';
  context.stroke();
  context.lineCap = 'butt';
}
