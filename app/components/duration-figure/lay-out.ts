/** Everything the figure needs to know about where things stand, from data and size. */
import {
  type AxisTick,
  type ExceedanceAxis,
  exceedanceDomain,
  exceedancePosition,
  exceedanceTicks,
  type FlowAxis,
  type FlowScale,
  flowScale,
} from './axes.ts';
import type { FigureBand, FigureCurve } from './duration-figure';
import type { PixelCurve } from './nearest-curve';
import { spreadLabels } from './spread-labels';

export interface PlotBox {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

/** The end of a curve and where its label went, in pixels. */
export interface LineEnd {
  x: number;
  y: number;
  labelY: number;
}

interface Request {
  exceedances: readonly number[];
  lines: readonly FigureCurve[];
  thin: readonly FigureCurve[];
  band: FigureBand | null;
  x: ExceedanceAxis;
  y: FlowAxis;
  width: number;
  height: number;
}

export interface FigurePlan {
  margin: { top: number; right: number; bottom: number; left: number };
  axisWidth: number;
  axisHeight: number;
  plot: PlotBox;
  /** on narrow screens labels shrink to the number of the line */
  compact: boolean;
  flow: FlowScale;
  xTicks: AxisTick[];
  xDomain: [number, number];
  /** one row an exceedance, as the chart wants it */
  rows: Record<string, number | null | [number, number]>[];
  xs: number[];
  /** labelled curves first, then the thin ones */
  pixels: PixelCurve[];
  thinPixels: PixelCurve[];
  /** null for a line that gives no flow at all */
  ends: (LineEnd | null)[];
  toPixel(position: number): number;
}

const AXIS_WIDTH = 58;
const AXIS_HEIGHT = 28;
/** Height of a label and of the target that it is, which is 24 pixels at least (WCAG 2.2, 2.5.8). */
const LABEL_HEIGHT = 24;

export function layOut({ exceedances, lines, thin, band, x, y, width, height }: Request): FigurePlan {
  const compact = width < 640;
  const gutter = lines.length === 0 ? 16 : compact ? 30 : 190;
  const margin = { top: 10, right: gutter, bottom: 0, left: 0 };
  const plot = { left: AXIS_WIDTH, top: margin.top, right: width - gutter, bottom: height - AXIS_HEIGHT };
  const shown = [...lines, ...thin].flatMap((curve) => curve.flows);
  const flow = flowScale([...shown, ...(band ? [...band.p10, ...band.p90] : [])], y);
  const xDomain = exceedanceDomain(x);
  const positions = exceedances.map((exceedance) => exceedancePosition(exceedance, x));
  const xs = positions.map(
    (position) => plot.left + ((position - xDomain[0]) / (xDomain[1] - xDomain[0])) * (plot.right - plot.left),
  );
  const toPixel = (position: number) =>
    plot.bottom - ((position - flow.domain[0]) / (flow.domain[1] - flow.domain[0])) * (plot.bottom - plot.top);
  const inPixels = (curve: FigureCurve): PixelCurve => ({
    code: curve.code,
    y: curve.flows.map((value) => {
      const position = flow.position(value);
      return position === null ? null : toPixel(position);
    }),
  });
  const linePixels = lines.map(inPixels);
  const thinPixels = thin.map(inPixels);
  return {
    margin,
    axisWidth: AXIS_WIDTH,
    axisHeight: AXIS_HEIGHT,
    plot,
    compact,
    flow,
    xTicks: exceedanceTicks(x, compact),
    xDomain,
    rows: chartRows(positions, lines, band, flow),
    xs,
    pixels: [...linePixels, ...thinPixels],
    thinPixels,
    ends: lineEnds(linePixels, xs, plot),
    toPixel,
  };
}

function chartRows(
  positions: readonly number[],
  lines: readonly FigureCurve[],
  band: FigureBand | null,
  flow: FlowScale,
): FigurePlan['rows'] {
  return positions.map((x, index) => {
    const row: FigurePlan['rows'][number] = { x };
    lines.forEach((line, number) => {
      row[`line${number}`] = flow.position(line.flows[index]);
    });
    if (band) {
      const low = flow.position(band.p10[index]);
      const high = flow.position(band.p90[index]);
      row.band = low === null || high === null ? null : [low, high];
      row.median = flow.position(band.p50[index]);
    }
    return row;
  });
}

/** Where each line ends at the right, and its label beside the others without covering them. */
function lineEnds(curves: readonly PixelCurve[], xs: readonly number[], plot: PlotBox): (LineEnd | null)[] {
  const ends = curves.map(({ y }) => {
    const last = y.findLastIndex((value) => value !== null);
    return last < 0 ? null : { x: xs[last], y: y[last] as number };
  });
  const standing = ends.filter((end) => end !== null);
  const centres = spreadLabels(
    standing.map((end) => end.y),
    LABEL_HEIGHT,
    [plot.top - 8, plot.bottom + 8],
  );
  let next = 0;
  return ends.map((end) => (end === null ? null : { ...end, labelY: centres[next++] }));
}
