import { yearTicks } from '@/app/components/year-ticks';
import type { CommonPeriods } from '@/lib/jobs/records-types';
import { CHART_FONT, type ChartPalette } from '../_chart/chart-palette.ts';
import { type PeriodLayout, periodCount, periodXY } from './period-grid.ts';

/** How much ink lies over the paper at each step: the gap in the middle keeps the figures on the cells readable, dark
 *  on the lighter ones and light on the darker. */
export const TONES = [0.06, 0.15, 0.27, 0.68, 0.86];
const DARK_FROM = 0.5;

/** Smallest cell that has room for its figure. */
const FIGURE_WIDTH = 19;
const FIGURE_HEIGHT = 12;

export interface PeriodPicture {
  layout: PeriodLayout;
  periods: CommonPeriods;
  steps: readonly number[];
  cursor: readonly [number, number] | null;
  /** the basis's own period as resolved, and what "common" comes to */
  current: readonly [number, number] | null;
  common: readonly [number, number] | null;
}

const stepOf = (steps: readonly number[], stations: number): number =>
  steps.findLastIndex((least) => stations >= least);

export function drawPeriods(context: CanvasRenderingContext2D, picture: PeriodPicture, palette: ChartPalette): void {
  const { layout } = picture;
  for (let row = 0; row < layout.count; row++) {
    for (let column = row; column < layout.count; column++) {
      drawPeriod(context, picture, palette, layout.firstStart + row, layout.firstEnd + column);
    }
  }
  drawAxes(context, layout, palette);
  const { paper, alert, ink, blue } = palette;
  if (picture.common) drawRing(context, layout, picture.common, [paper, alert], 'common');
  if (picture.current) drawRing(context, layout, picture.current, [paper, ink], 'current');
  if (picture.cursor) drawRing(context, layout, picture.cursor, [paper, blue], 'cursor');
}

function drawPeriod(
  context: CanvasRenderingContext2D,
  { layout, periods, steps }: PeriodPicture,
  palette: ChartPalette,
  first: number,
  last: number,
) {
  const period = periodCount(periods, first, last);
  if (!period) return;
  const [x, y] = periodXY(layout, first, last);
  const gap = layout.cellWidth > 7 ? 1 : 0;
  const [width, height] = [layout.cellWidth - gap, layout.cellHeight - (layout.cellHeight > 7 ? 1 : 0)];
  const step = stepOf(steps, period.ranked);
  if (step < 0) {
    context.fillStyle = palette.edge;
    context.fillRect(x + width / 2 - 0.5, y + height / 2 - 0.5, 1, 1);
    return;
  }
  context.globalAlpha = TONES[step];
  context.fillStyle = palette.ink;
  context.fillRect(x, y, width, height);
  context.globalAlpha = 1;
  if (width < FIGURE_WIDTH || height < FIGURE_HEIGHT) return;
  context.font = `11px ${CHART_FONT}`;
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.fillStyle = TONES[step] > DARK_FROM ? palette.paper : palette.ink;
  context.fillText(String(period.ranked), x + width / 2, y + height / 2 + 0.5);
}

function drawAxes(context: CanvasRenderingContext2D, layout: PeriodLayout, palette: ChartPalette) {
  const { firstStart, firstEnd, count, left, top, cellWidth, cellHeight } = layout;
  context.font = `12px ${CHART_FONT}`;
  context.fillStyle = palette.ink2;
  context.textBaseline = 'middle';
  context.textAlign = 'center';
  for (const year of yearTicks(firstEnd, firstEnd + count - 1, count * cellWidth)) {
    context.fillText(String(year), Math.max(left + 14, left + (year - firstEnd + 0.5) * cellWidth), top / 2);
  }
  context.textAlign = 'right';
  // a label down the side needs a third of the room that one along the top needs
  for (const year of yearTicks(firstStart, firstStart + count - 1, count * cellHeight * 3)) {
    context.fillText(String(year), left - 8, top + (year - firstStart + 0.5) * cellHeight);
  }
}

/** Rings of unlike make, rimmed with paper, so that they are told apart where they lie on one cell: the common period's is the widest, the
 *  basis's is dark and inside it. */
function drawRing(
  context: CanvasRenderingContext2D,
  layout: PeriodLayout,
  [first, last]: readonly [number, number],
  [rim, colour]: [string, string],
  kind: 'common' | 'current' | 'cursor',
) {
  const [x, y] = periodXY(layout, first, last);
  const out = { common: 3.5, current: 1, cursor: 1 }[kind];
  const ring: [number, number, number, number] = [
    ...([x - out, y - out] as const),
    ...([layout.cellWidth - 1 + 2 * out, layout.cellHeight - 1 + 2 * out] as const),
  ];
  context.strokeStyle = rim;
  context.lineWidth = 5;
  context.strokeRect(...ring);
  context.strokeStyle = colour;
  context.lineWidth = kind === 'common' ? 2.5 : 2;
  context.strokeRect(...ring);
}
