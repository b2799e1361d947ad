import { type MarkedChange, markedChanges } from '@/app/components/change-marks/marked-changes';
import { count } from '@/app/components/format';
import { lowFlowYearLabel, lowFlowYearOfDay } from '@/lib/calendar/low-flow-year';
import { COUNTED_FLAGS, type CountedFlag, type RegionRecords, type StationYears } from '@/lib/jobs/records-types';

/** One station's low-flow year. */
export interface YearCell {
  year: number;
  /** days of the year (or of its season), days with a value, and days that count as missing under the basis */
  days: number;
  values: number;
  missing: number;
  flagged: Record<CountedFlag, number>;
  /** counts: usable under the basis · partly: it has values but does not count · none: it has none */
  state: 'counts' | 'partly' | 'none';
  /** why it does not count; '' where it does */
  reason: string;
}

/** The cell of a station's year; null outside its record. */
export function yearCell(records: RegionRecords, station: StationYears, year: number): YearCell | null {
  const at = station.firstYear === null ? -1 : year - station.firstYear;
  if (at < 0 || at >= station.values.length) return null;
  const values = station.values[at];
  const days = (flag: CountedFlag) => station.flagged[flag]?.[at] ?? 0;
  return {
    year,
    days: records.yearDays[year - (records.firstYear ?? year)] ?? 365,
    values,
    missing: station.missing[at],
    // written out: thousands of cells are looked at for every picture
    flagged: {
      provisional: days('provisional'),
      estimated: days('estimated'),
      ice: days('ice'),
      belowDetection: days('belowDetection'),
      suspect: days('suspect'),
      rejected: days('rejected'),
    },
    state: station.usable[at] === 1 ? 'counts' : values > 0 ? 'partly' : 'none',
    reason: records.reasons[station.reason[at]] ?? '',
  };
}

export const FLAG_WORDS: Record<CountedFlag, string> = {
  provisional: 'provisional',
  estimated: 'estimated',
  ice: 'under ice',
  belowDetection: 'below detection',
  suspect: 'suspect',
  rejected: 'rejected',
};

/** A year in words. Example: "1987/88: 352 of 366 days with a value, 14 without; 12 provisional, 3 suspect; the year
 *  counts" */
export function cellWords(cell: YearCell, yearStart: number): string {
  const flags = COUNTED_FLAGS.filter((flag) => cell.flagged[flag] > 0);
  const missing = cell.days - cell.values;
  const parts = [
    `${lowFlowYearLabel(cell.year, yearStart)}: ${cell.values} of ${count(cell.days, 'day')} with a value, ${missing} without`,
    flags.map((flag) => `${cell.flagged[flag]} ${FLAG_WORDS[flag]}`).join(', '),
    stateWords(cell),
  ];
  return parts.filter(Boolean).join('; ');
}

/** A station's dated changes that fall into a low-flow year. */
export const changesIn = (station: StationYears, year: number, yearStart: number): MarkedChange[] =>
  markedChanges(station.changes).filter(({ day }) => lowFlowYearOfDay(day, yearStart) === year);

export function stateWords({ state, reason }: YearCell): string {
  if (state === 'counts') return 'the year counts';
  if (state === 'none') return 'no values';
  return reason ? `the year does not count: ${reason}` : 'the year does not count';
}
