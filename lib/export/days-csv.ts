import { isoDate } from '../calendar/day.ts';
import { FLAG, type FlagName } from '../series/daily-series.ts';
import type { StationDays } from '../store/station-days.ts';
import { type Column, csvTable } from './csv.ts';
import { STATION_CODE } from './shared-columns.ts';

interface DayRow {
  code: string;
  date: string;
  value: number;
  unit: string;
  flags: string;
  text: string;
}

/** Flag bits as words with semicolons between. Example: 5 → "estimated;ice" */
export const flagWords = (bits: number): string =>
  (Object.keys(FLAG) as FlagName[]).filter((name) => (bits & FLAG[name]) !== 0).join(';');

const DAY_COLUMNS: readonly Column<DayRow>[] = [
  STATION_CODE,
  { name: 'date', datatype: 'date', description: 'day', value: (row) => row.date },
  {
    name: 'value',
    datatype: 'number',
    description: 'daily value in the unit beside it; empty where missing',
    value: (row) => row.value,
  },
  { name: 'unit', datatype: 'string', description: 'unit of the value', value: (row) => row.unit },
  {
    name: 'flags',
    datatype: 'string',
    description: 'flags as understood, with semicolons between; suspect is by the checks, rejected by a person',
    value: (row) => row.flags,
  },
  { name: 'text', datatype: 'string', description: 'quality code as the file wrote it', value: (row) => row.text },
];

/** A stretch of a station's days as CSV, one row a day. */
export function daysCsv(code: string, days: StationDays): string {
  return csvTable(
    DAY_COLUMNS,
    Array.from(days.values, (value, i) => ({
      code,
      date: isoDate(days.firstDay + i),
      value,
      unit: days.unit,
      flags: flagWords(days.flags[i]),
      text: days.texts[i],
    })),
  );
}
