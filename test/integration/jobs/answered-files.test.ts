import { expect, test } from 'vitest';
import type { Need } from '../../../lib/intake/types.ts';
import type { FileChoices } from '../../../lib/jobs/import-types.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { type Content, importOne, refusalOf, registeredRegion, storedDays } from './registered-region.ts';

/** What cannot be known is asked: the file is refused and changes nothing, and with the answer it is taken. */
const place = registeredRegion();

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

interface Case {
  what: string;
  file: string;
  content: Content;
  /** what the refusal asks for, the row and the value that it names */
  asks: [needs: Need, row: number | undefined, value: string | undefined];
  answer: FileChoices;
  /** the days that are new afterwards, by station: these and no others */
  stored: Record<string, Record<string, number>>;
}

const CASES: Case[] = [
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

test.each(CASES)('$what: asked for, then taken', async ({ file, content, asks, answer, stored }) => {
  const before = new Map<string, Record<string, number>>();
  for (const code of Object.keys(stored)) before.set(code, await storedDays(place, code));
  const { problem } = await refusalOf(place, file, content);
  expect([problem?.needs, problem?.row, problem?.value]).toEqual(asks);
  const { problems, taken } = await importOne(place, file, content, answer);
  expect(problems).toEqual([]);
  expect(taken.map((one) => one.file)).toEqual([file]);
  for (const [code, days] of Object.entries(stored))
    expect(await storedDays(place, code)).toEqual({ ...before.get(code), ...days });
});

const REGISTRIES: [string, string, [Need, number, string], FileChoices, object][] = [
  [
    'swapped latitude and longitude',
    'station_id,latitude,longitude\nS1,-107.5,50.4\nS2,-107.6,50.5\n',
    ['correction', 2, '-107.5, 50.4'],
    { corrections: ['swap-coordinates'] },
    { latitude: 50.4, longitude: -107.5 },
  ],
  [
    'longitudes from 0 to 360',
    'station_id,latitude,longitude\nS1,50.4,252.75\nS2,50.5,-107.5\n',
    ['correction', 2, '50.4, 252.75'],
    { corrections: ['longitude-360'] },
    { latitude: 50.4, longitude: -107.25 },
  ],
  [
    'areas without a unit',
    'station_id,drainage_area\nS1,100\n',
    ['area', 1, 'drainage_area'],
    { areaUnit: 'mi²' },
    // 1 mi² = 2.589 988 110 336 km² (NIST SP 811).
    { areaKm2: 258.9988110336 },
  ],
];

test.each(REGISTRIES)('a registry with %s: asked for, then taken', async (_what, content, asks, answer, facts) => {
  const { problem } = await refusalOf(place, 'more.csv', content);
  expect([problem?.needs, problem?.row, problem?.value]).toEqual(asks);
  expect((await importOne(place, 'more.csv', content, answer)).problems).toEqual([]);
  expect(await getStation(place.region.id, 'S1')).toMatchObject(facts);
});

test('days unlike those that stand: asked for with their number, then taken by the rule', async () => {
  await importOne(place, 'old.csv', `${HEADER}A1,2004-01-01,1\nA1,2004-01-02,2\n`);
  const text = `${HEADER}A1,2004-01-02,4\nA1,2004-01-03,3\n`;
  const { problem, revisions } = await refusalOf(place, 'new.csv', text);
  expect([problem?.needs, revisions?.unlike]).toEqual(['revise', 1]);
  expect((await importOne(place, 'new.csv', text, {}, { rule: 'take-new' })).problems).toEqual([]);
  expect(await storedDays(place, 'A1')).toMatchObject({ '2004-01-01': 1, '2004-01-02': 4, '2004-01-03': 3 });
});
