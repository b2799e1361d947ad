import { describe, expect, test } from 'vitest';
import type { InspectOptions } from '../../../lib/intake/types.ts';
import { DATE_AT_START } from '../../fixed-width.ts';
import { dates, inspect } from './reading.ts';

test('inspectFile says how a good file will be read, with its header and first rows, and no problems', async () => {
  const seen = await inspect('station,date,flow_cfs,flag\n007,2001-03-01,1.50,A\n');
  expect(seen).toEqual({
    mapping: {
      ...{ layout: 'long', station: { from: 'column', column: 0 }, date: { columns: [1], order: 'ymd' } },
      ...{ value: { column: 2 }, flag: { column: 3 }, unit: 'ft3/s', missing: [], decimal: '.', delimiter: ',' },
    },
    header: ['station', 'date', 'flow_cfs', 'flag'],
    preview: [
      ['station', 'date', 'flow_cfs', 'flag'],
      ['007', '2001-03-01', '1.50', 'A'],
    ],
    previewLines: [1, 2],
    problems: [],
    valueCandidates: [{ place: { column: 2 }, label: 'flow_cfs', samples: ['1.50'] }],
    understood: [{ row: 2, station: '007', date: '2001-03-01', value: 1.5, flag: 'A', bits: 0, problem: null }],
    ...{ others: [], facts: [], sheets: null },
  });
});

test('inspectFile offers the slices of a fixed-width file and asks for column and unit', async () => {
  const lines = ['1948 1 1    0.0000    0.4600', '1948 1 2    0.0000    0.4550', '19481231    1.0000  -99.0000'];
  const seen = await inspect(lines.join('\n'), { fileName: 'x.dly' });
  expect(seen.mapping).toMatchObject({
    ...{ layout: 'fixed-width', station: { from: 'file-name' }, value: null, unit: null },
    date: DATE_AT_START,
  });
  expect(seen.problems.map(({ problem }) => problem.needs)).toEqual(['mapping', 'unit']);
  expect(seen.valueCandidates).toEqual([
    { place: { slice: [8, 18] }, label: 'characters 9–18', samples: ['0.0000', '0.0000', '1.0000'] },
    { place: { slice: [18, 28] }, label: 'characters 19–28', samples: ['0.4600', '0.4550', '-99.0000'] },
  ]);
  expect(seen.preview[0]).toEqual(['1948', '1', '1', '0.0000', '0.4600']);
});

test('inspectFile lays a partial mapping and a unit over what it recognised', async () => {
  const text = 'station,date,upper,lower\nX,2001-01-01,1,2\n';
  expect((await inspect(text, { unit: 'L/s' })).problems.map(({ problem }) => problem.needs)).toEqual(['mapping']);
  const answered = await inspect(text, { unit: 'L/s', mapping: { value: { column: 'lower' } } });
  expect(answered.problems).toEqual([]);
  expect(answered.mapping).toMatchObject({ layout: 'long', value: { column: 'lower' }, unit: 'L/s' });
});

test('inspectFile of a file that nothing can be made of has its problem and no mapping', async () => {
  const seen = await inspect('');
  expect(seen).toMatchObject({ mapping: null, header: null, preview: [], valueCandidates: [] });
  expect(seen.problems[0].message).toMatch(/gauge.csv: the file is empty/);
});

test('inspectFile asks for the date order where dates contradict one another, if that shows in the first rows', async () => {
  const rows = ['13/1/2001,5', '1/14/2001,6', '2/3/2001,7'];
  const { problems, understood } = await inspect(`date,flow_m3s\n${rows.join('\n')}\n`);
  expect(problems.map(({ problem }) => [problem.needs, problem.row])).toEqual([['date-order', 3]]);
  expect(understood.map(({ date }) => date)).toEqual(['2001-01-13', '2001-01-14', null]);
});

test('inspectFile finds the date order, and asks for it where no date says it', async () => {
  const decided = await inspect('date,flow_m3s\n1/2/2001,1\n1/13/2001,2\n');
  expect(decided.mapping?.date).toEqual({ columns: [0], order: 'mdy' });
  expect(decided.problems).toEqual([]);
  const open = await inspect('date,flow_m3s\n1/2/2001,1\n');
  expect(open.problems.map(({ problem }) => problem.needs)).toEqual(['date-order']);
});

describe('the rows as understood', () => {
  const rowsOf = async (text: string, options: Partial<InspectOptions> = {}) =>
    (await inspect(text, options)).understood;

  test('inspectFile shows values, missing codes and flags, and says of a row that is not taken why', async () => {
    const rows = await rowsOf(
      'station,date,flow,flag\nA,2001-01-01,1.5,P:e\nA,2001-01-02,-999,\nA,2001-02-30,2,A\n\nB,2001-01-01,<0.5,\n',
    );
    expect(rows).toEqual([
      { row: 2, station: 'A', date: '2001-01-01', value: 1.5, flag: 'P:e', bits: 3, problem: null },
      { row: 3, station: 'A', date: '2001-01-02', value: null, flag: '-999', bits: 0, problem: null },
      {
        row: 4,
        station: '',
        date: null,
        value: null,
        flag: '',
        bits: 0,
        problem: '“2001-02-30” is not a day of the calendar',
      },
      { row: 6, station: 'B', date: '2001-01-01', value: 0.5, flag: '<', bits: 8, problem: null },
    ]);
  });

  test('inspectFile shows what it understands while unit, order and flow column are not known', async () => {
    const seen = await inspect('date,upper,lower,note\n1/2/2001,1,2,x\n5/5/2001,3,4,x\n');
    const needs = seen.problems.map(({ problem }) => problem.needs);
    expect(needs).toContain('unit');
    expect(needs).toContain('date-order');
    const bare = await inspect('date,flow\n1/2/2001,1\n5/5/2001,3\n');
    expect(bare.understood).toEqual([
      expect.objectContaining({
        row: 2,
        station: 'gauge',
        date: null,
        value: 1,
        problem: expect.stringMatching(/month first/),
      }),
      expect.objectContaining({ row: 3, date: '2001-05-05', value: 3, problem: null }),
    ]);
    const open = await inspect('station,date,upper,lower\nA,2001-01-01,1,2\n', { unit: 'L/s' });
    expect(open.understood).toEqual([
      expect.objectContaining({
        station: 'A',
        date: '2001-01-01',
        value: null,
        problem: expect.stringMatching(/which column/),
      }),
    ]);
  });

  test('inspectFile shows rows of a station that the registry does not know, and asks', async () => {
    const known = { knownStations: [{ code: '0012', name: '' }] };
    const seen = await inspect('station,date,flow_m3s\n12,2001-01-01,1\n13,2001-01-01,2\n', known);
    expect(seen.problems.map(({ problem }) => problem.needs)).toEqual(['station', 'codes']);
    expect(seen.understood.map(({ station, problem }) => [station, problem])).toEqual([
      ['0012', null],
      ['13', 'the registry has no such station'],
    ]);
  });

  test('inspectFile shows forty rows at most, and reads each station of a wide table', async () => {
    const long = ['date,flow_m3s', ...dates('2001-01-01', 100).map((date, at) => `${date},${at}`)].join('\n');
    expect((await rowsOf(long)).map(({ value }) => value)).toEqual(Array.from({ length: 40 }, (_, at) => at));
    const wide = await rowsOf('date,A,B\n2001-01-01,1,2\n2001-01-02,x,4\n', { unit: 'L/s' });
    expect(wide.map(({ row, station, value, problem }) => [row, station, value, problem === null])).toEqual([
      [2, 'A', 1, true],
      [2, 'B', 2, true],
      [3, 'B', 4, true],
      [3, '', null, false],
    ]);
  });
});

test('inspectFile asks about several values a day, and about one a month', async () => {
  const hours = Array.from(
    { length: 48 },
    (_, at) => `2001-01-0${1 + (at >= 24 ? 1 : 0)} ${String(at % 24).padStart(2, '0')}:00,${at}`,
  );
  const hourly = await inspect(`date,flow_m3s\n${hours.join('\n')}\n`);
  expect(hourly.problems.map(({ problem }) => problem.needs)).toEqual(['daily-mean']);
  expect(hourly.problems[0].problem.message).toBe(
    'the file has several values a day, mostly every 1 hour (24 on most days)',
  );
  const monthly = await inspect(
    `date,flow_m3s\n${['01', '02', '03', '04', '05'].map((m) => `2001-${m}-01,1`).join('\n')}\n`,
  );
  expect(monthly.problems[0].problem.message).toMatch(/one value a month/);
});
