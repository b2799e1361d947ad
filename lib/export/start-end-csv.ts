import type { RankingRow } from '../region/ranking-types.ts';
import type { StartEnd } from '../region/window-types.ts';
import type { Column } from './csv.ts';
import { STATION_CODE } from './shared-columns.ts';

/** One window of one station. */
export interface WindowRow {
  code: string;
  start: number;
  end: number;
  years: number;
  z: number;
  p: number;
  slopePerDecade: number;
  percentPerDecade: number;
}

/** The ends of a window. */
export const WINDOW: readonly Column<{ start: number; end: number }>[] = [
  {
    name: 'first_year',
    datatype: 'integer',
    description: 'low-flow year in which the window begins',
    value: ({ start }) => start,
  },
  { name: 'last_year', datatype: 'integer', description: 'last low-flow year of the window', value: ({ end }) => end },
];

/** Columns of a station's start–end chart.
 *  @param unit  of the slope, before "per decade"; empty for a number without unit */
export function startEndColumns(unit: string): readonly Column<WindowRow>[] {
  return [
    STATION_CODE,
    ...WINDOW,
    { name: 'years_used', datatype: 'integer', description: 'usable years in the window', value: ({ years }) => years },
    { name: 'z', datatype: 'number', description: 'Mann–Kendall Z, below 0 where it gets drier', value: ({ z }) => z },
    { name: 'p_value', datatype: 'number', description: 'two-sided, not adjusted', value: ({ p }) => p },
    {
      name: 'slope_per_decade',
      datatype: 'number',
      description: 'Theil–Sen slope of what is tested',
      unit: unit === '' ? '1/decade' : `${unit}/decade`,
      value: ({ slopePerDecade }) => slopePerDecade,
    },
    {
      name: 'slope_percent_per_decade',
      datatype: 'number',
      description: 'the slope in percent of the window’s mean; empty where that is not above 0 or means nothing',
      unit: '%/decade',
      value: ({ percentPerDecade }) => percentPerDecade,
    },
  ];
}

/** Every window of at least 15 usable years, by start and then by end. */
export function* startEndRows(
  { code, years }: Pick<RankingRow, 'code' | 'years'>,
  chart: StartEnd,
): Generator<WindowRow> {
  for (let i = 0; i < chart.starts.length; i++) {
    for (let j = 0; j < chart.ends.length; j++) {
      const cell = i * chart.ends.length + j;
      if (Number.isNaN(chart.z[cell])) continue;
      const [start, end] = [chart.starts[i], chart.ends[j]];
      yield {
        code,
        start,
        end,
        years: years.filter((year) => year >= start && year <= end).length,
        z: chart.z[cell],
        p: chart.p[cell],
        slopePerDecade: chart.slopePerDecade[cell],
        percentPerDecade: chart.percentPerDecade[cell],
      };
    }
  }
}
