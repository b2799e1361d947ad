import { drawChangeMarks } from '@/app/components/change-marks/draw-change-marks';
import { type MarkedChange, placeChanges } from '@/app/components/change-marks/marked-changes';
import { dateOfDay } from '@/lib/calendar/day';
import { CHART_FONT, type ChartPalette } from '../_chart/chart-palette.ts';
import { shortened } from '../_chart/draw-chart.ts';
import { type DayLayout, dayX } from './day-layout.ts';
import { type DayColumns, hasFlag } from './days-answer.ts';
import type { FlowAxis } from './flow-axis.ts';
import { tickText } from './flow-axis.ts';

/** A row below the hydrograph: what it is of, and the stretches of days that have it. */
export interface Lane {
  label: string;
  look: 'plain' | 'alert' | 'crossed' | 'open';
  /** day numbers, both included */
  stretches: readonly (readonly [number, number])[];
}

export interface DayPicture {
  layout: DayLayout;
  columns: DayColumns;
  axis: FlowAxis;
  lanes: readonly Lane[];
  /** days outside the basis's season are shaded; null: all year */
  season: readonly [number, number] | null;
  changes: readonly MarkedChange[];
  cursor: number | null;
  selection: readonly [number, number] | null;
}

export function drawDays(context: CanvasRenderingContext2D, picture: DayPicture, palette: ChartPalette): void {
  drawSelection(context, picture, palette);
  drawOutOfSeason(context, picture, palette);
  drawAxes(context, picture, palette);
  drawLine(context, picture, palette);
  drawPoints(context, picture, palette);
  drawChanges(context, picture, palette);
  for (const [index, lane] of picture.lanes.entries()) drawLane(context, picture, palette, lane, index);
  drawCursor(context, picture, palette);
}

function drawSelection(context: CanvasRenderingContext2D, { layout, selection }: DayPicture, palette: ChartPalette) {
  if (!selection) return;
  // a stretch may begin and end in other years
  const from = Math.max(layout.left, dayX(layout, selection[0]));
  const to = Math.min(layout.right, dayX(layout, selection[1] + 1));
  if (to <= from) return;
  context.fillStyle = palette.wash;
  context.fillRect(from, layout.top, to - from, layout.height - layout.top);
  context.fillStyle = palette.blue;
  for (const x of [from, to]) context.fillRect(x - 0.75, layout.top, 1.5, layout.height - layout.top);
}

function drawOutOfSeason(context: CanvasRenderingContext2D, { layout, season }: DayPicture, palette: ChartPalette) {
  if (!season) return;
  context.globalAlpha = 0.5;
  context.fillStyle = palette.rule;
  const last = layout.first + layout.days;
  for (const [from, to] of [
    [layout.first, season[0]],
    [season[1] + 1, last],
  ]) {
    if (to > from)
      context.fillRect(
        dayX(layout, from),
        layout.top,
        dayX(layout, to) - dayX(layout, from),
        layout.floor - layout.top,
      );
  }
  context.globalAlpha = 1;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

function drawAxes(context: CanvasRenderingContext2D, { layout, axis }: DayPicture, palette: ChartPalette) {
  const { left, right, top, floor, first, days } = layout;
  context.font = `12px ${CHART_FONT}`;
  context.textBaseline = 'middle';
  context.textAlign = 'right';
  for (const tick of axis.ticks) {
    const y = Math.round(top + axis.y(tick)) + 0.5;
    context.fillStyle = palette.rule;
    context.fillRect(left, y - 0.5, right - left, 1);
    context.fillStyle = palette.ink2;
    context.fillText(tickText(tick), left - 8, y);
  }
  context.fillStyle = palette.edge;
  context.fillRect(left, floor, right - left, 1);
  context.textAlign = 'left';
  const wide = (right - left) / 12 > 34;
  for (let day = first; day < first + days; day++) {
    const { year, month, day: ofMonth } = dateOfDay(day);
    if (ofMonth !== 1) continue;
    const x = Math.round(dayX(layout, day));
    context.fillStyle = month === 1 ? palette.edge : palette.rule;
    context.fillRect(x, top, 1, floor - top + 5);
    context.fillStyle = palette.ink2;
    const name = wide ? MONTHS[month - 1] : MONTHS[month - 1].slice(0, 1);
    context.fillText(month === 1 && wide ? `${name} ${year}` : name, x + 4, floor + 13);
  }
}

/** Rejected days break the line, as missing ones do: they count as missing. */
function drawLine(context: CanvasRenderingContext2D, { layout, columns, axis }: DayPicture, palette: ChartPalette) {
  const width = (layout.right - layout.left) / layout.days;
  context.beginPath();
  let open = false;
  for (let at = 0; at < layout.days; at++) {
    const value = columns.values[at];
    if (Number.isNaN(value) || hasFlag(columns.flags[at], 'rejected')) {
      open = false;
      continue;
    }
    const x = dayX(layout, layout.first + at);
    const y = layout.top + axis.y(value);
    if (open) context.lineTo(x + width / 2, y);
    else {
      // a day between two gaps is a short stroke of its own
      context.moveTo(x, y);
      context.lineTo(x + width, y);
    }
    open = true;
  }
  context.strokeStyle = palette.ink;
  context.lineWidth = 1.5;
  context.lineJoin = 'round';
  context.stroke();
}

/** Suspect days as orange dots, rejected ones as crosses where their value lies. */
function drawPoints(context: CanvasRenderingContext2D, { layout, columns, axis }: DayPicture, palette: ChartPalette) {
  const half = (layout.right - layout.left) / layout.days / 2;
  for (let at = 0; at < layout.days; at++) {
    if (Number.isNaN(columns.values[at])) continue;
    const x = dayX(layout, layout.first + at) + half;
    const y = layout.top + axis.y(columns.values[at]);
    if (hasFlag(columns.flags[at], 'rejected')) {
      context.strokeStyle = palette.ink2;
      context.lineWidth = 1.25;
      context.beginPath();
      for (const [dx, dy] of [
        [-2.5, -2.5],
        [-2.5, 2.5],
      ]) {
        context.moveTo(x + dx, y + dy);
        context.lineTo(x - dx, y - dy);
      }
      context.stroke();
    } else if (hasFlag(columns.flags[at], 'suspect')) {
      context.fillStyle = palette.alert;
      context.beginPath();
      context.arc(x, y, 2.5, 0, 2 * Math.PI);
      context.fill();
    }
  }
}

function drawChanges(context: CanvasRenderingContext2D, { layout, changes }: DayPicture, palette: ChartPalette) {
  const placed = placeChanges(changes, (day) => dayX(layout, day), [layout.left, layout.right]);
  const { ink, paper } = palette;
  drawChangeMarks(context, placed, { top: layout.top, bottom: layout.floor, ink, paper });
}

function drawLane(
  context: CanvasRenderingContext2D,
  { layout }: DayPicture,
  palette: ChartPalette,
  { label, look, stretches }: Lane,
  index: number,
) {
  const y = layout.lanes + index * layout.laneHeight;
  const bar = layout.laneHeight - 8;
  context.fillStyle = palette.rule;
  context.fillRect(layout.left, y + layout.laneHeight / 2 - 0.5, layout.right - layout.left, 1);
  context.font = `12px ${CHART_FONT}`;
  context.textBaseline = 'middle';
  context.textAlign = 'right';
  context.fillStyle = palette.ink2;
  context.fillText(shortened(context, label, layout.left - 12), layout.left - 8, y + layout.laneHeight / 2);
  for (const [first, last] of stretches) {
    const x = dayX(layout, Math.max(layout.first, first));
    const end = dayX(layout, Math.min(layout.first + layout.days, last + 1));
    if (end <= layout.left || x >= layout.right) continue;
    const width = Math.max(3, end - x);
    context.fillStyle = look === 'alert' ? palette.alert : palette.full;
    if (look === 'open') {
      context.strokeStyle = palette.ink2;
      context.lineWidth = 1.5;
      context.strokeRect(x + 0.75, y + 4.75, Math.max(2, width - 1.5), bar - 1.5);
    } else context.fillRect(x, y + 4, width, bar);
    if (look === 'crossed') strikeOut(context, palette, x, y + 4, width, bar);
  }
}

function strikeOut(
  context: CanvasRenderingContext2D,
  palette: ChartPalette,
  x: number,
  y: number,
  width: number,
  height: number,
) {
  context.save();
  context.beginPath();
  context.rect(x, y, width, height);
  context.clip();
  context.strokeStyle = palette.paper;
  context.lineWidth = 1.5;
  context.beginPath();
  for (let at = x - height; at < x + width; at += 6) {
    context.moveTo(at, y + height);
    context.lineTo(at + height, y);
  }
  context.stroke();
  context.restore();
}

function drawCursor(
  context: CanvasRenderingContext2D,
  { layout, columns, axis, cursor }: DayPicture,
  palette: ChartPalette,
) {
  if (cursor === null) return;
  const x = dayX(layout, cursor) + (layout.right - layout.left) / layout.days / 2;
  context.fillStyle = palette.blue;
  context.fillRect(x - 0.5, layout.top, 1, layout.height - layout.top);
  const value = columns.values[cursor - layout.first];
  if (Number.isNaN(value)) return;
  context.beginPath();
  context.arc(x, layout.top + axis.y(value), 3.5, 0, 2 * Math.PI);
  context.fill();
}
