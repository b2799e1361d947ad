import { markedChanges, yearPosition } from '@/app/components/change-marks/marked-changes';
import { yearTicks } from '@/app/components/year-ticks';
import type { RegionRecords } from '@/lib/jobs/records-types';
import { type CellPlace, type ChartLayout, rowY, type Scroll, visibleRows, yearX } from './chart-layout.ts';
import { CHART_FONT } from './chart-palette.ts';
import { type CellLook, drawCell, drawChange } from './draw-cell.ts';
import type { Sorted } from './sort-stations.ts';
import { yearCell } from './year-cell.ts';

export interface ChartPicture {
  layout: ChartLayout;
  records: RegionRecords;
  rows: readonly Sorted[];
  /** second words of a row's label: the figure by which the rows are sorted */
  figures: readonly string[];
  /** each row's name as it was cut to a width, kept between pictures */
  names: { text: string; width: number }[];
  cursor: CellPlace | null;
  /** the year whose panel is open */
  open: CellPlace | null;
  scroll: Scroll;
}

/** Draws what shows of the chart in a box of this size. */
export function drawChart(
  context: CanvasRenderingContext2D,
  picture: ChartPicture,
  look: CellLook,
  width: number,
  height: number,
): void {
  const { layout, scroll } = picture;
  const [from, to] = visibleRows(layout, height, scroll);
  clipped(context, [0, layout.axis, width, height - layout.axis], () => {
    for (let row = from; row < to; row++) drawGround(context, picture, look, row, width);
    drawGrid(context, picture, look, width, height);
    clipped(context, [layout.gutter, layout.axis, width - layout.gutter, height], () => {
      for (let row = from; row < to; row++) {
        drawRow(context, picture, look, row, width);
        drawChanges(context, picture, look, row);
      }
      for (const [place, colour] of outlines(picture, look)) drawOutline(context, picture, place, colour);
    });
    for (let row = from; row < to; row++) drawLabel(context, picture, look, row);
  });
  drawAxis(context, picture, look, width);
}

type Rectangle = [x: number, y: number, width: number, height: number];

function clipped(context: CanvasRenderingContext2D, rectangle: Rectangle, draw: () => void): void {
  context.save();
  context.beginPath();
  context.rect(...rectangle);
  context.clip();
  draw();
  context.restore();
}

/** The row of the cursor lies on a wash, so that the eye finds its label. */
function drawGround(
  context: CanvasRenderingContext2D,
  { layout, cursor, open, scroll }: ChartPicture,
  { palette }: CellLook,
  row: number,
  width: number,
) {
  if (row !== cursor?.row && row !== open?.row) return;
  context.fillStyle = palette.wash;
  context.fillRect(0, rowY(layout, row, scroll), width, layout.rowHeight);
}

function drawRow(
  context: CanvasRenderingContext2D,
  { layout, records, rows, scroll }: ChartPicture,
  look: CellLook,
  row: number,
  width: number,
) {
  const ratio = context.getTransform().a;
  const snap = (value: number) => Math.round(value * ratio) / ratio;
  const { station } = rows[row];
  if (station.firstYear === null) return;
  const y = rowY(layout, row, scroll) + 3;
  const gap = layout.cell > 8 ? 2 : 1;
  const last = station.firstYear + station.values.length - 1;
  for (let year = station.firstYear; year <= last; year++) {
    const left = yearX(layout, year, scroll);
    if (left + layout.cell < layout.gutter || left > width) continue;
    const cell = yearCell(records, station, year);
    if (!cell) continue;
    const x = snap(left);
    drawCell(context, cell, { x, y, width: snap(left + layout.cell - gap) - x, height: layout.rowHeight - 5 }, look);
  }
}

/** A row's dated changes, each at its day. */
function drawChanges(
  context: CanvasRenderingContext2D,
  { layout, records, rows, scroll }: ChartPicture,
  look: CellLook,
  row: number,
) {
  const { changes } = rows[row].station;
  if (changes.length === 0) return;
  const y = rowY(layout, row, scroll);
  for (const { day } of markedChanges(changes)) {
    const year = yearPosition(day, records.basis.yearStart) + 0.5;
    if (year < layout.firstYear || year > layout.lastYear + 1) continue;
    drawChange(context, Math.round(yearX(layout, year, scroll)), [y + 1, layout.rowHeight - 2], look);
  }
}

function* outlines({ cursor, open }: ChartPicture, { palette }: CellLook): Generator<[CellPlace, string]> {
  if (open) yield [open, palette.ink];
  if (cursor) yield [cursor, palette.blue];
}

function drawOutline(
  context: CanvasRenderingContext2D,
  { layout, scroll }: ChartPicture,
  { row, year }: CellPlace,
  colour: string,
) {
  context.strokeStyle = colour;
  context.lineWidth = 2;
  context.strokeRect(
    yearX(layout, year, scroll) - 1,
    rowY(layout, row, scroll) + 1,
    Math.max(4, layout.cell),
    layout.rowHeight - 1,
  );
}

function drawLabel(
  context: CanvasRenderingContext2D,
  { layout, rows, figures, names, scroll }: ChartPicture,
  { palette }: CellLook,
  row: number,
) {
  const y = rowY(layout, row, scroll) + layout.rowHeight / 2 + 0.5;
  const right = layout.gutter - 10;
  context.textBaseline = 'middle';
  let room = right - 4;
  if (figures[row] && layout.gutter > 160) {
    context.font = `12px ${CHART_FONT}`;
    context.fillStyle = palette.ink2;
    context.textAlign = 'right';
    const figure = shortened(context, figures[row], room * 0.45);
    context.fillText(figure, right, y);
    room -= context.measureText(figure).width + 10;
  }
  context.font = `500 12.5px ${CHART_FONT}`;
  context.fillStyle = palette.ink;
  context.textAlign = 'left';
  if (names[row].width !== room) names[row] = { text: shortened(context, rows[row].station.name, room), width: room };
  context.fillText(names[row].text, 4, y);
}

/** Text cut to fit, its end as an ellipsis. */
export function shortened(
  context: Pick<CanvasRenderingContext2D, 'measureText'>,
  text: string,
  widthPx: number,
): string {
  if (context.measureText(text).width <= widthPx) return text;
  let [fits, tooLong] = [0, text.length];
  while (tooLong - fits > 1) {
    const middle = (fits + tooLong) >> 1;
    if (context.measureText(`${text.slice(0, middle).trimEnd()}…`).width <= widthPx) fits = middle;
    else tooLong = middle;
  }
  return `${text.slice(0, fits).trimEnd()}…`;
}

const ticksOf = ({ layout }: ChartPicture): number[] =>
  yearTicks(layout.firstYear, layout.lastYear, layout.cell * (layout.lastYear - layout.firstYear + 1));

function drawGrid(
  context: CanvasRenderingContext2D,
  picture: ChartPicture,
  { palette }: CellLook,
  width: number,
  height: number,
) {
  context.fillStyle = palette.rule;
  for (const year of ticksOf(picture)) {
    const x = yearX(picture.layout, year, picture.scroll);
    if (x >= picture.layout.gutter && x <= width) context.fillRect(Math.round(x) - 1, picture.layout.axis, 1, height);
  }
}

function drawAxis(context: CanvasRenderingContext2D, picture: ChartPicture, { palette }: CellLook, width: number) {
  const { layout, scroll } = picture;
  context.fillStyle = palette.edge;
  context.fillRect(0, layout.axis - 1, width, 1);
  context.font = `12px ${CHART_FONT}`;
  context.fillStyle = palette.ink2;
  context.textBaseline = 'middle';
  context.textAlign = 'center';
  for (const year of ticksOf(picture)) {
    const x = yearX(layout, year, scroll) + layout.cell / 2;
    if (x < layout.gutter || x > width - 8) continue;
    context.fillText(String(year), Math.min(x, width - 17), layout.axis / 2);
  }
}
