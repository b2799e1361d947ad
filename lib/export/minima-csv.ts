import { isoDate } from '../calendar/day.ts';
import type { StationMinima } from '../region/ranking-types.ts';
import { type Column, csvTable } from './csv.ts';
import { LOW_FLOW_YEAR, STATION_CODE } from './shared-columns.ts';

/** One year of one station. */
export interface MinimaRow {
  code: string;
  year: number;
  usable: boolean;
  missingDays: number;
  /** m³/s; NaN when the year has no complete n-day window */
  minimum: number;
  /** ISO date; null when there is no minimum */
  date: string | null;
  reason: string;
  flaggedDays: number;
}

export const MINIMA_COLUMNS: readonly Column<MinimaRow>[] = [
  STATION_CODE,
  LOW_FLOW_YEAR,
  { name: 'usable', datatype: 'boolean', description: 'whether the year may be used', value: (row) => row.usable },
  { name: 'missing_days', datatype: 'integer', description: 'days without a value', value: (row) => row.missingDays },
  {
    name: 'minimum_m3s',
    datatype: 'number',
    unit: 'm³/s',
    description: 'smallest n-day mean; “at most” in a year that is not usable',
    value: (row) => row.minimum,
  },
  {
    name: 'date',
    datatype: 'date',
    description: 'last day of the first window that attains the minimum',
    value: (row) => row.date,
  },
  { name: 'reason', datatype: 'string', description: 'why the year is not usable', value: (row) => row.reason },
  {
    name: 'flagged_days',
    datatype: 'integer',
    description: 'days that carry any flag',
    value: (row) => row.flaggedDays,
  },
];

/** Every year of every station given, station by station, years rising. */
export function* minimaRows(stations: readonly StationMinima[]): Generator<MinimaRow> {
  for (const { station, minima } of stations) {
    for (let i = 0; i < minima.years.length; i++) {
      yield {
        code: station.code,
        year: minima.years[i],
        usable: minima.usable[i] === 1,
        missingDays: minima.missingDays[i],
        minimum: minima.minimum[i],
        date: Number.isNaN(minima.minimum[i]) ? null : isoDate(minima.day[i]),
        reason: minima.reason[i],
        flaggedDays: minima.flaggedDays[i],
      };
    }
  }
}

/** Annual minima as CSV, one row a station and low-flow year. */
export function minimaCsv(stations: readonly StationMinima[]): string {
  return csvTable(MINIMA_COLUMNS, minimaRows(stations));
}
