import { count, fixed } from '@/app/components/format';
import type { PeriodCount } from './period-grid.ts';

/** Example: "31 of 36 stations, 1,395 station-years" */
export function kept(period: PeriodCount | null, stations: number): string {
  if (period === null) return 'no station: it is shorter than the years asked for, or lies outside the records';
  const zeros = period.complete - period.ranked;
  return [
    `${fixed(period.ranked)} of ${count(stations, 'station')}, ${count(period.stationYears, 'station-year')}`,
    zeros > 0 ? `; ${fixed(zeros)} more would be complete but run dry too often to be ranked` : '',
  ].join('');
}
