/** Start years by end years on real time axes: end years from left to right, start years from the top down, in CSS pixels.
 *  Windows are long, so the lower left half is empty. */
export interface WindowGrid {
  firstStart: number;
  lastStart: number;
  firstEnd: number;
  lastEnd: number;
  left: number;
  top: number;
  cellWidth: number;
  cellHeight: number;
  width: number;
  height: number;
}

/** A window from one low-flow year to another, both of them in it. */
export type YearWindow = readonly [start: number, end: number];

const LEFT = 52;
const TOP = 30;
const WIDEST = 24;
const TALLEST = 15;
const LEAST = 3;
const MOST_HEIGHT = 460;

/** @param starts  start years, rising, and `ends` likewise
 *  @param width   room there is; a chart of many years on a narrow screen is wider
 *  @returns       null when there is no window */
export function layOutWindows(starts: readonly number[], ends: readonly number[], width: number): WindowGrid | null {
  if (starts.length === 0 || ends.length === 0) return null;
  const [firstStart, lastStart] = [starts[0], starts[starts.length - 1]];
  const [firstEnd, lastEnd] = [ends[0], ends[ends.length - 1]];
  const [columns, rows] = [lastEnd - firstEnd + 1, lastStart - firstStart + 1];
  const cellWidth = Math.min(WIDEST, Math.max(LEAST, (width - LEFT - 8) / columns));
  const cellHeight = Math.min(TALLEST, Math.max(LEAST, MOST_HEIGHT / rows), cellWidth);
  return {
    ...{ firstStart, lastStart, firstEnd, lastEnd, cellWidth, cellHeight },
    left: LEFT,
    top: TOP,
    width: Math.ceil(LEFT + columns * cellWidth + 8),
    height: Math.ceil(TOP + rows * cellHeight + 6),
  };
}

/** Upper left corner of a window's cell. */
export const windowXY = (grid: WindowGrid, [start, end]: YearWindow): [x: number, y: number] => [
  grid.left + (end - grid.firstEnd) * grid.cellWidth,
  grid.top + (start - grid.firstStart) * grid.cellHeight,
];

/** The window under a point, whether or not it has an answer; null beside the chart. */
export function hitWindow(grid: WindowGrid, x: number, y: number): YearWindow | null {
  const end = grid.firstEnd + Math.floor((x - grid.left) / grid.cellWidth);
  const start = grid.firstStart + Math.floor((y - grid.top) / grid.cellHeight);
  const inside =
    end >= grid.firstEnd && end <= grid.lastEnd && start >= grid.firstStart && start <= grid.lastStart && start <= end;
  return inside ? [start, end] : null;
}

const MOVES: Record<string, [start: number, end: number]> = {
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
};

/** The window that a key leads to: left and right change the end year, up and down the start year, over years without an
 *  answer; Home and End go to the longest and the latest window. Where there is none that way it stays. Null for other keys.
 *  @param has  whether a window has an answer */
export function windowAfterKey(
  grid: WindowGrid,
  has: (window: YearWindow) => boolean,
  from: YearWindow | null,
  key: string,
): YearWindow | null {
  const whole: YearWindow = [grid.firstStart, grid.lastEnd];
  if (key === 'Home') return whole;
  if (key === 'End') return latest(grid, has) ?? whole;
  const move = MOVES[key];
  if (!move) return null;
  if (from === null) return whole;
  let [start, end] = [from[0] + move[0], from[1] + move[1]];
  while (start >= grid.firstStart && start <= grid.lastStart && end >= grid.firstEnd && end <= grid.lastEnd) {
    if (has([start, end])) return [start, end];
    start += move[0];
    end += move[1];
  }
  return from;
}

function latest(grid: WindowGrid, has: (window: YearWindow) => boolean): YearWindow | null {
  for (let start = grid.lastStart; start >= grid.firstStart; start--) {
    if (has([start, grid.lastEnd])) return [start, grid.lastEnd];
  }
  return null;
}
