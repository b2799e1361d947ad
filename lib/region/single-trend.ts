import type { Basis } from '../basis.ts';
import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { orNull } from './or-null.ts';
import type { PairTrend } from './pair-types.ts';
import { trendFamily, type YearlySeries } from './trend-family.ts';

/** The fewest values that a trend is taken of. */
export const FEWEST_FOR_TREND = 3;

/** Trend of one series by itself, by the test and the serial correction of the ranking. A regional correction needs
 *  ten series and so comes to that of the series alone.
 *  @param mean  what percentages are of
 *  @param seed  names the random draws of a correction that draws
 *  @returns     null with fewer than 3 values */
export function singleTrend(
  series: YearlySeries,
  { serialCorrection, mean, seed }: { serialCorrection: Basis['serialCorrection']; mean: number; seed: string },
): PairTrend | null {
  if (series.values.length < FEWEST_FOR_TREND) return null;
  const [{ slope, low, high, intercept, z, p, tau, r1, serialFactor }] = trendFamily([series], serialCorrection, seed);
  const percent = (perYear: number) => (mean > 0 ? orNull((100 * YEARS_PER_DECADE * perYear) / mean) : null);
  return {
    slopePerDecade: orNull(slope * YEARS_PER_DECADE),
    low: orNull(low * YEARS_PER_DECADE),
    high: orNull(high * YEARS_PER_DECADE),
    intercept: orNull(intercept),
    percentPerDecade: percent(slope),
    percentLow: percent(low),
    percentHigh: percent(high),
    z: orNull(z),
    p: orNull(p),
    tau: orNull(tau),
    r1: orNull(r1),
    serialFactor,
  };
}

/** Mean of at least one value. */
export const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length;
