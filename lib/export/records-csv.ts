import type { CommonPeriods, CountedFlag, RegionRecords, StationYears } from '../jobs/records-types.ts';
import { type Column, csvTable } from './csv.ts';
import { LOW_FLOW_YEAR, STATION_CODE } from './shared-columns.ts';

/** One low-flow year of one station. */
interface RecordYear {
  records: RegionRecords;
  station: StationYears;
  /** index into the station's columns */
  at: number;
}

const flagged = (name: string, flag: CountedFlag, words: string): Column<RecordYear> => ({
  name: `${name}_days`,
  datatype: 'integer',
  description: `days with a value flagged as ${words}`,
  value: ({ station, at }) => station.flagged[flag]?.[at] ?? 0,
});

const yearOf = ({ station, at }: RecordYear): number => (station.firstYear ?? 0) + at;

const RECORD_COLUMNS: readonly Column<RecordYear>[] = [
  { ...STATION_CODE, value: ({ station }) => station.code },
  { ...LOW_FLOW_YEAR, value: yearOf },
  {
    name: 'days',
    datatype: 'integer',
    description: 'days of the year or season',
    value: (row) => row.records.yearDays[yearOf(row) - (row.records.firstYear ?? 0)],
  },
  {
    name: 'value_days',
    datatype: 'integer',
    description: 'days with a value, whatever its flag',
    value: ({ station, at }) => station.values[at],
  },
  {
    name: 'missing_days',
    datatype: 'integer',
    description: 'days without a value, rejected, or with a flag that the basis leaves out',
    value: ({ station, at }) => station.missing[at],
  },
  flagged('provisional', 'provisional', 'provisional'),
  flagged('estimated', 'estimated', 'estimated'),
  flagged('ice', 'ice', 'affected by ice'),
  flagged('below_detection', 'belowDetection', 'below detection'),
  flagged('suspect', 'suspect', 'suspect by the program’s checks'),
  flagged('rejected', 'rejected', 'rejected by a person'),
  {
    name: 'usable',
    datatype: 'boolean',
    description: 'whether the year counts under the basis',
    value: ({ station, at }) => station.usable[at] === 1,
  },
  {
    name: 'reason',
    datatype: 'string',
    description: 'why the year does not count',
    value: ({ records, station, at }) => records.reasons[station.reason[at]] ?? '',
  },
];

function* rowsOf(records: RegionRecords): Generator<RecordYear> {
  for (const station of records.stations) {
    for (let at = 0; at < station.values.length; at++) yield { records, station, at };
  }
}

/** What the records of a region hold as CSV: a row for every low-flow year of every station. */
export const recordsCsv = (records: RegionRecords): string => csvTable(RECORD_COLUMNS, rowsOf(records));

interface Period {
  first: number;
  last: number;
  ranked: number;
  complete: number;
}

const PERIOD_COLUMNS: readonly Column<Period>[] = [
  { name: 'first_year', datatype: 'integer', description: 'first low-flow year', value: ({ first }) => first },
  { name: 'last_year', datatype: 'integer', description: 'last low-flow year', value: ({ last }) => last },
  {
    name: 'years',
    datatype: 'integer',
    description: 'years of the period',
    value: ({ first, last }) => last - first + 1,
  },
  {
    name: 'stations_ranked',
    datatype: 'integer',
    description: 'stations that would be ranked',
    value: ({ ranked }) => ranked,
  },
  {
    name: 'stations_complete',
    datatype: 'integer',
    description: 'stations complete enough, whatever their share of zero minima',
    value: ({ complete }) => complete,
  },
];

function* periodsOf({ basis, firstYear, lastYear, ranked, complete }: CommonPeriods): Generator<Period> {
  if (firstYear === null || lastYear === null) return;
  const years = lastYear - firstYear + 1;
  for (let from = 0; from < years; from++) {
    for (let to = from + basis.minYears - 1; to < years; to++) {
      const at = from * years + to;
      yield { first: firstYear + from, last: firstYear + to, ranked: ranked[at], complete: complete[at] };
    }
  }
}

/** How many stations would stay over every period that is long enough, as CSV. */
export const commonPeriodsCsv = (periods: CommonPeriods): string => csvTable(PERIOD_COLUMNS, periodsOf(periods));
