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
  slopeUnit: string;
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

export const START_END_COLUMNS: readonly Column<WindowRow>[] = [
  STATION_CODE,
  ...WINDOW,
  { name: 'years_used', datatype: 'integer', description: 'usable years in the window', value: ({ years }) => years },
  { name: 'z', datatype: 'number', description: 'Mann–Kendall Z, below 0 where it gets drier', value: ({ z }) => z },
  { name: 'p_value', datatype: 'number', description: 'two-sided, not adjusted', value: ({ p }) => p },
  {
    name: 'slope_per_decade',
    datatype: 'number',
    description: 'Theil–Sen slope of what is tested, in slope_unit per decade',
    value: ({ slopePerDecade }) => slopePerDecade,
  },
  {
    name: 'slope_unit',
    datatype: 'string',
    description: 'unit of the slope before “per decade”; empty for a number without unit',
    value: ({ slopeUnit }) => slopeUnit,
  },
  {
    name: 'slope_percent_per_decade',
    datatype: 'number',
    description: 'the slope in percent of the window’s mean; empty where that is not above 0 or means nothing',
    unit: '%/decade',
    value: ({ percentPerDecade }) => percentPerDecade,
  },
];

/** A station's start–end chart with what it is of. */
export interface StartEndToWrite {
  row: Pick<RankingRow, 'code' | 'years' | 'trendOf'>;
  /** of the slopes, before "per decade"; empty for a number without unit */
  slopeUnit: string;
  chart: StartEnd;
}

/** Every window of at least 15 usable years, by start and then by end. */
export function* startEndRows({ row, slopeUnit, chart }: StartEndToWrite): Generator<WindowRow> {
  const { code, years } = row;
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
        z: single(chart.z[cell]),
        p: single(chart.p[cell]),
        slopePerDecade: single(chart.slopePerDecade[cell]),
        slopeUnit,
        percentPerDecade: single(chart.percentPerDecade[cell]),
      };
    }
  }
}

/** Charts hold single precision: the seven digits that it has, without what comes after them. */
const single = (value: number): number => Number(value.toPrecision(7));
