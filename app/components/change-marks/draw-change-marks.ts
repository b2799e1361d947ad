import { type PlacedChange, TAB } from './marked-changes.ts';

/** Dated changes on a time axis that is drawn on canvas, as ChangeMarks draws them in SVG.
 *  @param ink, paper  colours of the lines and tabs, and of the letters on them */
export function drawChangeMarks(
  context: CanvasRenderingContext2D,
  changes: readonly PlacedChange[],
  { top, bottom, ink, paper }: { top: number; bottom: number; ink: string; paper: string },
): void {
  context.save();
  context.font = '650 11px sans-serif';
  context.textAlign = 'center';
  context.lineWidth = 1.25;
  for (const { x, row, letter } of changes) {
    const y = top + row * TAB.height;
    context.strokeStyle = ink;
    context.setLineDash([5, 3, 1, 3]);
    context.beginPath();
    context.moveTo(x, y);
    context.lineTo(x, bottom);
    context.stroke();
    context.fillStyle = ink;
    context.fillRect(x, y, TAB.width - 2, TAB.height - 2);
    context.fillStyle = paper;
    context.fillText(letter, x + TAB.width / 2 - 1, y + TAB.height - 4);
  }
  context.restore();
}
