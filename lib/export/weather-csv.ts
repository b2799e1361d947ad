import type { WeatherTrend, WeatherYear } from '../region/pair-types.ts';
import { type Column, csvTable } from './csv.ts';
import { LOW_FLOW_YEAR, QUANTITY, STATION_CODE } from './shared-columns.ts';

/** One usable year with its minimum and the weather before it. */
export interface WeatherRow extends WeatherYear {
  code: string;
  quantity: string;
  from: string;
  antecedentDays: number;
}

export const WEATHER_COLUMNS: readonly Column<WeatherRow>[] = [
  STATION_CODE,
  LOW_FLOW_YEAR,
  {
    name: 'minimum_m3s',
    datatype: 'number',
    unit: 'm³/s',
    description: 'smallest n-day mean of the year',
    value: ({ minimum }) => minimum,
  },
  QUANTITY,
  {
    name: 'measured_at',
    datatype: 'string',
    description: 'code of the station where the weather was measured',
    value: ({ from }) => from,
  },
  {
    name: 'antecedent_days',
    datatype: 'integer',
    unit: 'd',
    description: 'days summed, the last of them the date of the minimum',
    value: ({ antecedentDays }) => antecedentDays,
  },
  {
    name: 'weather_mm',
    datatype: 'number',
    unit: 'mm',
    description: 'depth in these days',
    value: (row) => row.weather,
  },
  {
    name: 'fitted_m3s',
    datatype: 'number',
    unit: 'm³/s',
    description: 'what such weather usually leaves: LOWESS curve of minimum on weather',
    value: ({ fitted }) => fitted,
  },
  {
    name: 'residual_m3s',
    datatype: 'number',
    unit: 'm³/s',
    description: 'minimum less the fitted one: what is tested for a trend',
    value: ({ residual }) => residual,
  },
];

/** One row a year, with what they share. */
export function weatherRows({ station, quantity, from, antecedentDays, years }: WeatherTrend): WeatherRow[] {
  return years.map((year) => ({ ...year, code: station.code, quantity, from: from.code, antecedentDays }));
}

/** Minima and the weather before them as CSV, one row a year. */
export function weatherCsv(trend: WeatherTrend): string {
  return csvTable(WEATHER_COLUMNS, weatherRows(trend));
}
