/** Where the cells of the chart of years lie: pure geometry, in CSS pixels from the upper left corner of the content, of
 *  which the box shows a part. Labels and axis stand still while the cells scroll. */
export interface ChartLayout {
  rows: number;
  /** first and last low-flow year of the axis */
  firstYear: number;
  lastYear: number;
  /** width of the station labels, height of the axis */
  gutter: number;
  axis: number;
  rowHeight: number;
  /** width of a year */
  cell: number;
  /** of the whole content */
  width: number;
  height: number;
}

const AXIS = 30;
const ROW = 22;
/** A narrower year cannot be told from its neighbour or hit by a finger; a wider one says no more. */
const LEAST_CELL = 4;
const WIDEST_CELL = 26;
const RIGHT = 8;

/** @param width  of the box that shows the chart */
export function layOutChart(width: number, rows: number, firstYear: number, lastYear: number): ChartLayout {
  if (!(lastYear >= firstYear)) {
    throw new RangeError(`layOutChart: lastYear must not come before firstYear, got ${firstYear} and ${lastYear}`);
  }
  const gutter = width < 640 ? Math.min(124, Math.round(width * 0.34)) : Math.min(280, Math.round(width * 0.24));
  const years = lastYear - firstYear + 1;
  const cell = Math.min(WIDEST_CELL, Math.max(LEAST_CELL, (width - gutter - RIGHT) / years));
  return {
    rows,
    firstYear,
    lastYear,
    gutter,
    axis: AXIS,
    rowHeight: ROW,
    cell,
    width: Math.max(width, Math.ceil(gutter + years * cell + RIGHT)),
    height: AXIS + rows * ROW + 1,
  };
}

export interface Scroll {
  left: number;
  top: number;
}

export interface CellPlace {
  row: number;
  year: number;
}

/** Left edge of a year in the box. */
export const yearX = (layout: ChartLayout, year: number, { left }: Scroll): number =>
  layout.gutter + (year - layout.firstYear) * layout.cell - left;

/** Upper edge of a row in the box. */
export const rowY = (layout: ChartLayout, row: number, { top }: Scroll): number =>
  layout.axis + row * layout.rowHeight - top;

/** The cell under a point of the box; null over axis, labels and empty paper. */
export function hitCell(layout: ChartLayout, x: number, y: number, scroll: Scroll): CellPlace | null {
  if (x < layout.gutter || y < layout.axis) return null;
  const row = Math.floor((y - layout.axis + scroll.top) / layout.rowHeight);
  const year = layout.firstYear + Math.floor((x - layout.gutter + scroll.left) / layout.cell);
  return row < layout.rows && year <= layout.lastYear ? { row, year } : null;
}

/** Rows that show in a box of this height, the last one excluded. */
export function visibleRows(layout: ChartLayout, boxHeight: number, { top }: Scroll): [number, number] {
  const first = Math.max(0, Math.floor(top / layout.rowHeight));
  const last = Math.ceil((top + boxHeight - layout.axis) / layout.rowHeight);
  return [first, Math.max(first, Math.min(layout.rows, last))];
}

/** Where a box must be scrolled to so that a cell is wholly seen; as it is when it is seen already. */
export function scrollToCell(
  layout: ChartLayout,
  { row, year }: CellPlace,
  box: { width: number; height: number },
  scroll: Scroll,
): Scroll {
  const x = (year - layout.firstYear) * layout.cell;
  return {
    top: clampInto(scroll.top, row * layout.rowHeight, layout.rowHeight, box.height - layout.axis),
    left: clampInto(scroll.left, x, layout.cell, box.width - layout.gutter - RIGHT),
  };
}

function clampInto(scroll: number, start: number, size: number, room: number): number {
  if (start < scroll) return start;
  return Math.max(scroll, start + size - room);
}

/** The cell that a key leads to; null for a key that leads nowhere. A move never leaves the chart.
 *  @param page  rows that Page Up and Page Down go */
export function cellAfterKey(
  layout: ChartLayout,
  from: CellPlace | null,
  key: string,
  { page, whole }: { page: number; whole: boolean },
): CellPlace | null {
  const { firstYear, lastYear, rows } = layout;
  if (rows === 0) return null;
  const moves: Record<string, [rows: number, years: number]> = {
    ArrowLeft: [0, -1],
    ArrowRight: [0, 1],
    ArrowUp: [-1, 0],
    ArrowDown: [1, 0],
    PageUp: [-page, 0],
    PageDown: [page, 0],
    Home: [whole ? -rows : 0, firstYear - lastYear],
    End: [whole ? rows : 0, lastYear - firstYear],
  };
  const move = moves[key];
  if (!move) return null;
  if (from === null) return { row: 0, year: key === 'End' || key === 'ArrowLeft' ? lastYear : firstYear };
  return {
    row: Math.min(rows - 1, Math.max(0, from.row + move[0])),
    year: Math.min(lastYear, Math.max(firstYear, from.year + move[1])),
  };
}
