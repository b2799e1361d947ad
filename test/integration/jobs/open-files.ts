import type { Need } from '../../../lib/intake/types.ts';
import type { FileChoices } from '../../../lib/jobs/import-types.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import type { Content } from './registered-region.ts';

/** Files of flows and lists of stations that leave a question open, each with its answer, for a region as
 *  `registeredRegion` makes it. */

const HEADER = 'station,date,discharge_m3s\n';
const sheet = (name: string, ...rows: (string | number)[][]) => ({
  name,
  rows: [['station', 'date', 'flow m3/s'], ...rows].map((row, at) => rowOf(at + 1, row)).join(''),
});
/** Sixty readings: two whole days, and twelve hours. */
const HOURS = Array.from({ length: 60 }, (_, hour) => {
  const clock = `2003-05-0${1 + Math.floor(hour / 24)} ${String(hour % 24).padStart(2, '0')}:00`;
  return `A1,${clock},${hour % 24}`;
});
const SERIES = [
  { station: 'A1', property: 'Stage', uom: 'code="m"', points: daily(['1.5']) },
  { station: 'A1', property: 'Rainfall', uom: 'code="mm"', points: daily(['7', '8']) },
];

export interface OpenFile {
  what: string;
  file: string;
  content: Content;
  /** what the refusal asks for, the row and the value that it names */
  asks: [needs: Need, row: number | undefined, value: string | undefined];
  answer: FileChoices;
  /** the days that are new afterwards, by station: these and no others */
  stored: Record<string, Record<string, number>>;
}

export const OPEN_FILES: OpenFile[] = [
  {
    what: 'codes that differ by case or by leading zeros',
    file: 'codes.csv',
    content: `${HEADER}ab7,2001-02-01,1\n102,2001-02-01,2\n`,
    asks: ['codes', 2, 'ab7'],
    answer: { matchCodes: true },
    stored: { AB7: { '2001-02-01': 1 }, '0102': { '2001-02-01': 2 } },
  },
  {
    what: 'dates that may be of day and month or of month and day',
    file: 'order.csv',
    content: `${HEADER}A1,01/02/2003,1\nA1,02/02/2003,2\n`,
    asks: ['date-order', undefined, '01/02/2003'],
    answer: { mapping: { date: { columns: [1], order: 'dmy' } } },
    stored: { A1: { '2003-02-01': 1, '2003-02-02': 2 } },
  },
  {
    what: 'dates of both orders',
    file: 'orders.csv',
    content: `${HEADER}A1,13/03/2003,1\nA1,03/14/2003,2\nA1,04/03/2003,3\n`,
    asks: ['date-order', 3, '03/14/2003'],
    answer: { mapping: { date: { columns: [1], order: 'dmy' } } },
    stored: { A1: { '2003-03-13': 1, '2003-03-04': 3 } },
  },
  {
    what: 'years of two digits',
    file: 'century.csv',
    content: `${HEADER}A1,01-Feb-29,1\nA1,13-Feb-29,2\n`,
    asks: ['century', undefined, '01-Feb-29'],
    answer: { mapping: { firstYear: 1920 } },
    stored: { A1: { '1929-02-01': 1, '1929-02-13': 2 } },
  },
  {
    what: 'a comma that may stand between thousands',
    file: 'thousands.csv',
    content: 'station;date;discharge_m3s\nA1;2003-04-01;1,234\nA1;2003-04-02;12,345\n',
    asks: ['thousands', undefined, '1,234'],
    answer: { mapping: { thousands: ',' } },
    stored: { A1: { '2003-04-01': 1234, '2003-04-02': 12345 } },
  },
  {
    what: 'several values a day, the last day only half covered',
    file: 'hours.csv',
    content: `station,time,discharge_m3s\n${HOURS.join('\n')}\n`,
    asks: ['daily-mean', 3, '2003-05-01'],
    answer: { mapping: { dailyMean: 0.8 } },
    // (0 + 1 + … + 23) / 24
    stored: { A1: { '2003-05-01': 11.5, '2003-05-02': 11.5, '2003-05-03': Number.NaN } },
  },
  {
    what: 'two units in one column',
    file: 'units.csv',
    content: 'station,date,flow,unit\nA1,2003-06-01,1,m3/s\nA1,2003-06-02,35,ft3/s\n',
    asks: ['mapping', 3, 'ft3/s'],
    answer: { mapping: { where: { column: 'unit', equals: 'm3/s' } } },
    stored: { A1: { '2003-06-01': 1 } },
  },
  {
    what: 'a heading that says one unit, and a column that says another',
    file: 'contradiction.csv',
    content: 'station,date,flow_m3s,unit\nA1,2003-06-03,35,ft3/s\nA1,2003-06-04,36,ft3/s\n',
    asks: ['unit', undefined, 'flow_m3s'],
    answer: { unit: 'ft3/s' },
    stored: { A1: { '2003-06-03': 35, '2003-06-04': 36 } },
  },
  {
    what: 'no unit',
    file: 'bare.csv',
    content: 'station,date,flow\nA1,2003-06-05,1\nA1,2003-06-06,2\n',
    asks: ['unit', undefined, 'flow'],
    answer: { unit: 'L/s' },
    stored: { A1: { '2003-06-05': 1, '2003-06-06': 2 } },
  },
  {
    what: 'no station',
    file: 'Gauge.csv',
    content: 'date,discharge_m3s\n2003-07-01,1\n2003-07-02,2\n',
    asks: ['station', undefined, 'Gauge'],
    answer: { station: 'A1' },
    stored: { A1: { '2003-07-01': 1, '2003-07-02': 2 } },
  },
  {
    what: 'a workbook with two sheets of flows',
    file: 'sheets.xlsx',
    content: handMade({
      sheets: [sheet('Old', ['A1', '2003-08-01', 1]), sheet('New', ['A1', '2003-08-02', 2], ['A1', '2003-08-03', 3])],
    }),
    asks: ['sheet', undefined, undefined],
    answer: { mapping: { sheet: 'New' } },
    stored: { A1: { '2003-08-02': 2, '2003-08-03': 3 } },
  },
  {
    what: 'a document of other quantities than flow',
    file: 'series.xml',
    content: collection(...SERIES),
    asks: ['quantity', undefined, 'Stage; Rainfall'],
    answer: { mapping: { quantity: 'rainfall' } },
    stored: { A1: { '2001-01-01': 7, '2001-01-02': 8 } },
  },
];

export interface OpenList extends Pick<OpenFile, 'what' | 'file' | 'content' | 'asks' | 'answer'> {
  /** a station of it, as it is known afterwards */
  code: string;
  facts: object;
}

export const OPEN_LISTS: OpenList[] = [
  {
    what: 'swapped latitude and longitude',
    file: 'swapped.csv',
    content: 'station_id,latitude,longitude\nS1,-107.5,50.4\nS2,-107.6,50.5\n',
    asks: ['correction', 2, '-107.5, 50.4'],
    answer: { corrections: ['swap-coordinates'] },
    code: 'S1',
    facts: { latitude: 50.4, longitude: -107.5 },
  },
  {
    what: 'longitudes from 0 to 360',
    file: 'east.csv',
    content: 'station_id,latitude,longitude\nE1,50.4,252.75\nE2,50.5,-107.5\n',
    asks: ['correction', 2, '50.4, 252.75'],
    answer: { corrections: ['longitude-360'] },
    code: 'E1',
    facts: { latitude: 50.4, longitude: -107.25 },
  },
  {
    what: 'areas without a unit',
    file: 'areas.csv',
    content: 'station_id,drainage_area\nM1,100\n',
    asks: ['area', 1, 'drainage_area'],
    answer: { areaUnit: 'mi²' },
    code: 'M1',
    // 1 mi² = 2.589 988 110 336 km² (NIST SP 811).
    facts: { areaKm2: 258.9988110336 },
  },
];
