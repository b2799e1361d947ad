import type { ToneSteps } from '@/app/components/start-end/tone-steps';
import { roundSteps, Z_STEPS } from '@/app/components/start-end/tone-steps';
import type { YearWindow } from '@/app/components/start-end/window-grid';
import type { OnTheWire, StartEnd } from '@/lib/region/window-types';

/** A station's start–end chart as the server answers it. */
export interface StartEndAnswer extends OnTheWire<StartEnd> {
  /** of the slopes, before "per decade" */
  slopeUnit: string;
}

/** What the colours are of. */
export const CHART_FIGURES = ['z', 'change'] as const;
export type ChartFigure = (typeof CHART_FIGURES)[number];

/** Place of a window in the lists of an answer; −1 where the chart has none. */
export function cellIndex({ starts, ends }: Pick<StartEndAnswer, 'starts' | 'ends'>, [start, end]: YearWindow): number {
  const [row, column] = [starts.indexOf(start), ends.indexOf(end)];
  return row < 0 || column < 0 ? -1 : row * ends.length + column;
}

/** The change of every window: in percent where there are percentages, else in the unit of the slopes. */
export function changesOf({ percentPerDecade, slopePerDecade, slopeUnit }: StartEndAnswer): {
  values: (number | null)[];
  unit: string;
} {
  if (percentPerDecade.some((value) => value !== null)) return { values: percentPerDecade, unit: '%' };
  return { values: slopePerDecade, unit: slopeUnit };
}

/** Steps of colour for what is shown. Half of the largest change begins the darkest: single short windows outrun all
 *  others. */
export function stepsOf(figure: ChartFigure, changes: readonly (number | null)[]): ToneSteps {
  if (figure === 'z') return Z_STEPS;
  const sizes = changes.filter((value) => value !== null).map(Math.abs);
  return roundSteps(sizes.reduce((most, size) => Math.max(most, size), 0) / 2);
}
