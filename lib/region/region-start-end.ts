import type { ResolvedBasis } from '../basis.ts';
import { normalQuantile } from '../statistics/normal.ts';
import { testedSeries } from './index-facts.ts';
import { rowSerialTerms } from './row-serial-terms.ts';
import type { StartEndRow } from './start-end.ts';
import { windowGrid } from './window-grid.ts';
import { windowTests } from './window-tests.ts';
import { FEWEST_WINDOW_YEARS, type RegionStartEnd } from './window-types.ts';

/** Years that the chart of a region spans: the period, or from the first to the last usable year of any station. */
export function regionSpan(rows: readonly StartEndRow[], { period }: Pick<ResolvedBasis, 'period'>): [number, number] {
  if (period !== null) return period;
  let [first, last] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const { years } of rows) {
    if (years.length === 0) continue;
    first = Math.min(first, years[0]);
    last = Math.max(last, years[years.length - 1]);
  }
  return [first, last];
}

/** Start–end chart of a region: for every start year and end year, how many stations have at least 15 usable years
 *  between, and of these how many have a negative S, fall and rise with unadjusted p < alpha. Of drier indices minus the
 *  figure is tested, so that negative always is drier. Serial correction as at `windowTests`; period null: each station
 *  counts where it has years.
 *  @param rows  ranked stations, or some of them: charts of parts over one span add up (`addCharts`)
 *  @param span  [first, last] years of the axes, see `regionSpan`
 *  @throws RangeError when a value is not a finite number, or alpha does not lie between 0 and 1 */
export function regionStartEnd(
  rows: readonly StartEndRow[],
  { serialCorrection, alpha }: Pick<ResolvedBasis, 'serialCorrection' | 'alpha'>,
  span: readonly [number, number],
): RegionStartEnd {
  if (!(alpha > 0 && alpha < 1)) {
    throw new RangeError(`regionStartEnd: alpha must lie between 0 and 1, got ${alpha}`);
  }
  const chart = emptyChart(span);
  const critical = normalQuantile(1 - alpha / 2);
  for (const row of rows) {
    const series = testedSeries(row);
    const { starts, ends, firstAt, lastAt } = windowGrid(series.years, span);
    const { n, z, s } = windowTests(series, rowSerialTerms(row, serialCorrection), FEWEST_WINDOW_YEARS);
    if (starts.length === 0) continue;
    // a window of the region may begin before the station's first year, but not end before its fifteenth
    const across = ends[0] - chart.ends[0];
    for (let i = 0; i < starts.length; i++) {
      for (let j = 0; j < ends.length; j++) {
        if (lastAt[j] - firstAt[i] + 1 < FEWEST_WINDOW_YEARS) continue;
        const window = lastAt[j] * n + firstAt[i];
        const cell = i * chart.ends.length + across + j;
        chart.stations[cell]++;
        if (s[window] < 0) chart.negative[cell]++;
        if (z[window] < -critical) chart.falling[cell]++;
        else if (z[window] > critical) chart.rising[cell]++;
      }
    }
  }
  return chart;
}

function emptyChart([first, last]: readonly [number, number]): RegionStartEnd {
  const side = Math.max(0, last - first + 2 - FEWEST_WINDOW_YEARS);
  const counts = () => new Uint16Array(side * side);
  return {
    starts: Array.from({ length: side }, (_, i) => first + i),
    ends: Array.from({ length: side }, (_, i) => first + FEWEST_WINDOW_YEARS - 1 + i),
    stations: counts(),
    negative: counts(),
    falling: counts(),
    rising: counts(),
  };
}

/** Charts of parts of a region over one span, as one. There is at least one. */
export function addCharts(charts: readonly RegionStartEnd[]): RegionStartEnd {
  const [{ starts, ends }] = charts;
  const sum = (count: 'stations' | 'negative' | 'falling' | 'rising') =>
    charts[0][count].map((_, cell) => charts.reduce((total, chart) => total + chart[count][cell], 0));
  return {
    starts,
    ends,
    stations: sum('stations'),
    negative: sum('negative'),
    falling: sum('falling'),
    rising: sum('rising'),
  };
}
