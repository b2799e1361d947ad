import type { ResolvedBasis } from '../basis.ts';
import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { twoSidedP } from '../statistics/normal.ts';
import { windowSlopes } from '../statistics/window-slopes.ts';
import { isOfMinus, percentOfMean, testedSeries } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';
import { rowSerialTerms } from './row-serial-terms.ts';
import { steadinessOf } from './steadiness.ts';
import { windowGrid } from './window-grid.ts';
import { windowTests } from './window-tests.ts';
import { FEWEST_WINDOW_YEARS, type StartEnd } from './window-types.ts';

/** What a station's start–end chart is made from. */
export type StartEndRow = Pick<RankingRow, 'code' | 'years' | 'values' | 'trendOf' | 'r1' | 'serialFactor'>;

/** Start–end chart of one station: the trend of what the ranking tested, for every start year and end year of the period
 *  with at least 15 usable years between. Serial correction as at `windowTests`. The cell of the whole period has the
 *  ranking's own figures. Z is below 0 where it gets drier, also at a station that is not ranked. No years where the station
 *  has fewer than 15.
 *  @throws RangeError when a value is not a finite number */
export function startEnd(row: StartEndRow, { period, serialCorrection, index }: ResolvedBasis): StartEnd {
  // what the ranking would have tested, had it ranked the station
  const trendOf = row.trendOf ?? (index === 'minimum' ? 'minima' : index);
  const series = testedSeries({ ...row, trendOf });
  const { starts, ends, firstAt, lastAt } = windowGrid(series.years, period);
  const { n, z } = windowTests(series, rowSerialTerms(row, serialCorrection), FEWEST_WINDOW_YEARS);
  const slopes = windowSlopes(series.years, series.values, FEWEST_WINDOW_YEARS);
  const means = windowMeans(row.values);
  const ownSign = isOfMinus(trendOf) ? -1 : 1;
  const cells = starts.length * ends.length;
  const chart = {
    z: new Float32Array(cells).fill(Number.NaN),
    p: new Float32Array(cells).fill(Number.NaN),
    slopePerDecade: new Float32Array(cells).fill(Number.NaN),
    percentPerDecade: new Float32Array(cells).fill(Number.NaN),
  };
  const { windows, share } = steadinessOf(series, period);
  for (let i = 0; i < starts.length; i++) {
    for (let j = 0; j < ends.length; j++) {
      const window = lastAt[j] * n + firstAt[i];
      if (Number.isNaN(slopes[window])) continue;
      const cell = i * ends.length + j;
      chart.z[cell] = z[window];
      chart.p[cell] = Math.min(1, twoSidedP(z[window]));
      const perDecade = ownSign * YEARS_PER_DECADE * slopes[window];
      chart.slopePerDecade[cell] = perDecade;
      if (trendOf === 'zero-days') continue;
      chart.percentPerDecade[cell] = percentOfMean(perDecade, index, means(firstAt[i], lastAt[j])) ?? Number.NaN;
    }
  }
  return { starts, ends, ...chart, steadiness: share, windows };
}

/** Mean of the values i to j. */
function windowMeans(values: readonly number[]): (i: number, j: number) => number {
  const sums = new Float64Array(values.length + 1);
  values.forEach((value, i) => {
    sums[i + 1] = sums[i] + value;
  });
  return (i, j) => (sums[j + 1] - sums[i]) / (j - i + 1);
}
