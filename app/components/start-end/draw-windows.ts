import { CANVAS_FONT } from '../canvas/use-tokens.ts';
import { yearTicks } from '../year-ticks.ts';
import { type WindowGrid, windowXY, type YearWindow } from './window-grid.ts';

/** What a window's cell shows. */
export interface WindowCell {
  /** the sign of the trend: −1 falling, 1 rising */
  sign: number;
  /** −4 (falling most) to 4 */
  tone: number;
  /** beyond chance by itself: a mark that points the way the trend goes */
  marked: boolean;
}

export const WINDOW_TOKENS = {
  paper: '--paper',
  ink: '--ink',
  ink2: '--ink-2',
  blue: '--blue',
  dry: '--dry-fill',
  wet: '--wet-fill',
} as const;

type WindowPalette = Record<keyof typeof WINDOW_TOKENS, string>;

/** How much colour lies over the paper at each step from nought on; the same stand in the legend. */
export const TONE_OPACITY = [0.1, 0.26, 0.46, 0.7, 1] as const;

interface WindowPicture {
  grid: WindowGrid;
  /** null where the window has no answer */
  cellAt(window: YearWindow): WindowCell | null;
  cursor: YearWindow | null;
  /** the window that the page's other figures are of */
  whole: YearWindow | null;
}

/** Draws the start–end chart, with its years and what is marked in it, on a canvas that has been cleared. */
export function drawWindows(context: CanvasRenderingContext2D, picture: WindowPicture, palette: WindowPalette): void {
  const { grid, cursor, whole } = picture;
  eachCell(picture, (cell, window) => drawCell(context, grid, window, cell, palette));
  drawSignTurns(context, picture, palette);
  drawYears(context, grid, palette);
  if (whole) drawRing(context, grid, whole, palette.ink, palette);
  if (cursor) drawRing(context, grid, cursor, palette.blue, palette);
}

function eachCell({ grid, cellAt }: WindowPicture, visit: (cell: WindowCell, window: YearWindow) => void): void {
  for (let start = grid.firstStart; start <= grid.lastStart; start++) {
    for (let end = Math.max(start, grid.firstEnd); end <= grid.lastEnd; end++) {
      const cell = cellAt([start, end]);
      if (cell) visit(cell, [start, end]);
    }
  }
}

function drawCell(
  context: CanvasRenderingContext2D,
  grid: WindowGrid,
  window: YearWindow,
  { sign, tone, marked }: WindowCell,
  palette: WindowPalette,
): void {
  const [x, y] = windowXY(grid, window);
  const [width, height] = [gapped(grid.cellWidth), gapped(grid.cellHeight)];
  const step = Math.abs(tone);
  context.globalAlpha = sign === 0 ? TONE_OPACITY[0] : TONE_OPACITY[step];
  context.fillStyle = sign === 0 ? palette.ink2 : sign < 0 ? palette.dry : palette.wet;
  context.fillRect(x, y, width, height);
  context.globalAlpha = 1;
  if (!marked) return;
  context.fillStyle = TONE_OPACITY[step] > 0.5 ? palette.paper : palette.ink;
  const reach = Math.min(width, height) * 0.3;
  const [middleX, middleY] = [x + width / 2, y + height / 2];
  const tip = sign < 0 ? reach : -reach;
  context.beginPath();
  context.moveTo(middleX - reach, middleY - tip * 0.75);
  context.lineTo(middleX + reach, middleY - tip * 0.75);
  context.lineTo(middleX, middleY + tip);
  context.fill();
}

const gapped = (size: number): number => size - (size > 7 ? 1 : 0);

/** A line where neighbouring windows go opposite ways, so that the sides are told apart without colour. */
function drawSignTurns(context: CanvasRenderingContext2D, picture: WindowPicture, palette: WindowPalette): void {
  const { grid, cellAt } = picture;
  context.beginPath();
  eachCell(picture, ({ sign }, [start, end]) => {
    const [x, y] = windowXY(grid, [start, end]);
    const right = end < grid.lastEnd ? cellAt([start, end + 1]) : null;
    const below = start < grid.lastStart ? cellAt([start + 1, end]) : null;
    if (right && right.sign * sign < 0) {
      context.moveTo(x + grid.cellWidth - 0.5, y - 0.5);
      context.lineTo(x + grid.cellWidth - 0.5, y + grid.cellHeight - 0.5);
    }
    if (below && below.sign * sign < 0) {
      context.moveTo(x - 0.5, y + grid.cellHeight - 0.5);
      context.lineTo(x + grid.cellWidth - 0.5, y + grid.cellHeight - 0.5);
    }
  });
  context.lineWidth = 1.5;
  context.strokeStyle = palette.ink;
  context.stroke();
}

function drawYears(context: CanvasRenderingContext2D, grid: WindowGrid, palette: WindowPalette): void {
  const { firstStart, lastStart, firstEnd, lastEnd, left, top, cellWidth, cellHeight } = grid;
  context.font = `12px ${CANVAS_FONT}`;
  context.fillStyle = palette.ink2;
  context.textBaseline = 'middle';
  context.textAlign = 'center';
  const right = grid.width - 16;
  for (const year of yearTicks(firstEnd, lastEnd, (lastEnd - firstEnd + 1) * cellWidth)) {
    const x = left + (year - firstEnd + 0.5) * cellWidth;
    context.fillText(String(year), Math.min(right, Math.max(left + 14, x)), top / 2);
  }
  context.textAlign = 'right';
  // a label down the side needs a third of the room that one along the top needs
  for (const year of yearTicks(firstStart, lastStart, (lastStart - firstStart + 1) * cellHeight * 3)) {
    context.fillText(String(year), left - 8, top + (year - firstStart + 0.5) * cellHeight);
  }
}

function drawRing(
  context: CanvasRenderingContext2D,
  grid: WindowGrid,
  window: YearWindow,
  colour: string,
  palette: WindowPalette,
): void {
  const [x, y] = windowXY(grid, window);
  const ring: [number, number, number, number] = [
    x - 1,
    y - 1,
    gapped(grid.cellWidth) + 2,
    gapped(grid.cellHeight) + 2,
  ];
  context.strokeStyle = palette.paper;
  context.lineWidth = 5;
  context.strokeRect(...ring);
  context.strokeStyle = colour;
  context.lineWidth = 2;
  context.strokeRect(...ring);
}
