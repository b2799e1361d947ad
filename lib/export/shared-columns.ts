import { isoDate } from '../calendar/day.ts';
import type { Column } from './csv.ts';

/** Columns that several tables have, word for word. */
export const STATION_CODE: Column<{ code: string }> = {
  name: 'station_code',
  datatype: 'string',
  description: 'code of the gauging station',
  value: ({ code }) => code,
};

export const LOW_FLOW_YEAR: Column<{ year: number }> = {
  name: 'year',
  datatype: 'integer',
  description: 'low-flow year, named by the calendar year in which it begins',
  value: ({ year }) => year,
};

export const QUANTITY: Column<{ quantity: string }> = {
  name: 'quantity',
  datatype: 'string',
  description: 'of which record',
  value: ({ quantity }) => quantity,
};

/** The ends of a stretch of days, both included. */
export const STRETCH: readonly Column<{ firstDay: number; lastDay: number }>[] = [
  {
    name: 'first',
    datatype: 'date',
    description: 'first day of the stretch',
    value: ({ firstDay }) => isoDate(firstDay),
  },
  { name: 'last', datatype: 'date', description: 'last day of the stretch', value: ({ lastDay }) => isoDate(lastDay) },
];
