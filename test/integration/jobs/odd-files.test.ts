import { expect, test } from 'vitest';
import { isoDate, parseIsoDate } from '../../../lib/calendar/day.ts';
import { listFindings } from '../../../lib/store/findings.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { type Content, importOne, registeredRegion, storedDays } from './registered-region.ts';

/** Files that are odd and can be read: what is good of them is taken, and a person is told what to know of the rest. */
const place = registeredRegion();

const HEADER = 'station,date,discharge_m3s\n';
const daysFrom = (first: string, texts: string[]) =>
  texts.map((text, at) => `A1,${isoDate(parseIsoDate(first) + at)},${text}\n`).join('');
const cell = (at: string, content: string) => `<c r="${at}">${content}</c>`;
const text = (at: string, words: string) => `<c r="${at}" t="inlineStr"><is><t>${words}</t></is></c>`;

/** A title over three merged cells, a formula with its value, one without, and a merged block of two flows. */
const WORKBOOK = handMade({
  sheets: [
    {
      name: 'Flows',
      rows: [
        rowOf(1, ['Daily flows']),
        rowOf(2, ['station', 'date', 'flow m3/s']),
        `<row r="3">${text('A3', 'A1')}${text('B3', '2001-01-01')}${cell('C3', '<f>1+2</f><v>3</v>')}</row>`,
        `<row r="4">${text('A4', 'A1')}${text('B4', '2001-01-02')}${cell('C4', '<f>SUM(D1:D9)</f>')}</row>`,
        rowOf(5, ['A1', '2001-01-03', 5]),
        rowOf(6, ['A1', '2001-01-04', 6]),
        rowOf(7, ['A1', '2001-01-05', 7]),
      ].join(''),
      behind: '<mergeCells count="2"><mergeCell ref="A1:C1"/><mergeCell ref="C5:C6"/></mergeCells>',
    },
  ],
});

interface Case {
  what: string;
  file: string;
  content: Content;
  /** the days that are new afterwards, these and no others */
  stored: Record<string, number>;
  rejected?: [row: number, reason: RegExp][];
  warnings?: RegExp[];
}

const CASES: Case[] = [
  {
    what: 'a workbook with formulas and merged cells',
    file: 'book.xlsx',
    content: WORKBOOK,
    stored: { '2001-01-01': 3, '2001-01-03': 5, '2001-01-04': Number.NaN, '2001-01-05': 7 },
    rejected: [[4, /formula without a stored value/]],
    warnings: [/1 formulas have no stored value, the first in C4/],
  },
  {
    what: 'flows in thousands with separators',
    file: 'thousands.csv',
    content: `${HEADER}A1,2002-01-01,"1,234.5"\nA1,2002-01-02,"12,345,678"\nA1,2002-01-03,987\nA1,2002-01-04,"1,2,3"\n`,
    stored: { '2002-01-01': 1234.5, '2002-01-02': 12345678, '2002-01-03': 987 },
    rejected: [[5, /“1,2,3” is not a flow/]],
  },
  {
    what: 'flows in thousands set apart by points, decimals by a comma',
    file: 'points.csv',
    content: 'station;date;discharge_m3s\nA1;2002-02-01;1.234,5\nA1;2002-02-02;12.345,0\nA1;2002-02-03;987,25\n',
    stored: { '2002-02-01': 1234.5, '2002-02-02': 12345, '2002-02-03': 987.25 },
  },
  {
    what: 'negative tidal flows',
    file: 'tidal.csv',
    content: HEADER + daysFrom('2003-01-01', ['1.5', '-2.25', '-0.5', '3', '0']),
    stored: { '2003-01-01': 1.5, '2003-01-02': -2.25, '2003-01-03': -0.5, '2003-01-04': 3, '2003-01-05': 0 },
    warnings: [/2 values are negative; they were taken as written/],
  },
  {
    what: 'negative flows beside a number for missing ones',
    file: 'missing.csv',
    content: HEADER + daysFrom('2003-02-01', ['1.5', '-999', '-999', '-0.5', '2', '3']),
    stored: {
      ...{ '2003-02-01': 1.5, '2003-02-02': Number.NaN, '2003-02-03': Number.NaN },
      ...{ '2003-02-04': -0.5, '2003-02-05': 2, '2003-02-06': 3 },
    },
    warnings: [/1 values are negative/, /“-999” was read as missing, on 2 station days/],
  },
  {
    what: 'dates in the future',
    file: 'future.csv',
    content: `${HEADER}A1,2003-05-01,2\nA1,2003-05-02,2\nA1,2150-01-02,3\n`,
    stored: { '2003-05-01': 2, '2003-05-02': 2, '2150-01-02': 3 },
    warnings: [/1 values? lies? in the future, the first in row 4 \(2150-01-02\)/],
  },
  {
    what: 'dates written in two ways that are both plain',
    file: 'plain.csv',
    content: `${HEADER}A1,2004-01-13,1\nA1,14/01/2004,2\n`,
    stored: { '2004-01-13': 1, '2004-01-14': 2 },
  },
  {
    what: 'mixed delimiters',
    file: 'mixed.csv',
    content:
      'station;date;discharge_m3s\nA1;2005-01-01;2\nA1;2005-01-02;3\nA1,2005-01-03,4\nA1\t2005-01-04\t5\nA1;2005-01-05;6\n',
    stored: { '2005-01-01': 2, '2005-01-02': 3, '2005-01-05': 6 },
    rejected: [
      [4, /1 of 3 fields/],
      [5, /1 of 3 fields/],
    ],
  },
  {
    what: 'a table that is cut short within a row',
    file: 'cut.csv',
    content: (HEADER + daysFrom('2006-01-01', ['1', '2', '3', '4'])).slice(0, -6),
    stored: { '2006-01-01': 1, '2006-01-02': 2, '2006-01-03': 3 },
    rejected: [[5, /2 of 3 fields: it is cut short/]],
    warnings: [/last row has no line end: make sure that the file was not cut short/],
  },
  {
    what: 'four equal rows of one day',
    file: 'four.csv',
    content: `${HEADER}${'A1,2007-01-01,5\n'.repeat(4)}`,
    stored: { '2007-01-01': 5 },
    warnings: [/3 days stand twice with equal values; they were taken once/],
  },
  {
    what: 'a file that is called like a part of every object',
    file: 'constructor',
    content: `${HEADER}A1,2008-01-01,5\nA1,2008-01-02,6\n`,
    stored: { '2008-01-01': 5, '2008-01-02': 6 },
  },
];

test.each(CASES)('$what: taken as far as it can be read, and told of', async (one) => {
  const before = await storedDays(place, 'A1');
  const { taken, problems } = await importOne(place, one.file, one.content);
  expect(problems).toEqual([]);
  const { report, warnings } = taken[0];
  const { rejected = [], warnings: words = [] } = one;
  expect(report?.rejected.map(({ row }) => row)).toEqual(rejected.map(([row]) => row));
  for (const [at, [, reason]] of rejected.entries()) expect(report?.rejected[at].reason).toMatch(reason);
  expect(warnings).toHaveLength(words.length);
  for (const [at, pattern] of words.entries()) expect(warnings[at]).toMatch(pattern);
  expect(await storedDays(place, 'A1')).toEqual({ ...before, ...one.stored });
});

test('what is odd about days is found by the checks: negative ones, and those of the future', async () => {
  await importOne(place, 'both.csv', `${HEADER}0102,2003-05-01,-2\n0102,2003-05-02,2\n0102,2150-01-02,3\n`);
  const kinds = listFindings(place.region.id).flatMap(({ code, kind }) => (code === '0102' ? [kind] : []));
  expect(kinds.sort()).toEqual(['future', 'negative']);
});
