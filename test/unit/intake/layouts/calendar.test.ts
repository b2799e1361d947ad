import { describe, expect, test } from 'vitest';
import { daysInMonth } from '../../../../lib/calendar/day.ts';
import type { Mapping } from '../../../../lib/intake/types.ts';
import { FLAG } from '../../../../lib/series/daily-series.ts';
import { daysOf, inspect, read, refusal } from '../reading.ts';

const DAYS = Array.from({ length: 31 }, (_, at) => at + 1);
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const GERMAN = ['Januar', 'Februar', 'März', 'April', 'Mai', 'Juni', 'Juli', 'Aug.', 'Sept.', 'Okt.', 'Nov.', 'Dez.'];

/** A value that tells its day: 3.14 in March on the 14th. */
const flow = (month: number, day: number): string => (month + day / 100).toFixed(2);

/** The cells of a month; days that do not exist are empty. */
function month(year: number, number: number, cell = (day: number) => [flow(number, day)]): string[] {
  return DAYS.flatMap((day) => (day <= daysInMonth(year, number) ? cell(day) : cell(day).map(() => '')));
}

/** The rows of a year, a row a day of the month. */
function yearOfDays(year: number, order = MONTHS.map((_, at) => at + 1), first = year): string[][] {
  return DAYS.map((day) => [
    String(day),
    ...order.map((number) => {
      const lies = number < order[0] ? first + 1 : first;
      return day <= daysInMonth(lies, number) ? flow(number, day) : '';
    }),
  ]);
}

const csv = (rows: string[][], delimiter = ','): string => rows.map((row) => row.join(delimiter)).join('\n');

describe('a row a month', () => {
  const header = ['station', 'year', 'month', ...DAYS.map(String)];

  test('readFlows reads 31 columns of days, and days that do not exist are no days', async () => {
    const rows = [1, 2, 3, 4].map((number) => ['007', '2001', String(number), ...month(2001, number)]);
    const { report, days } = await read(csv([header, ...rows]), { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'month-rows', rows: 4, accepted: 4, rejected: [] });
    expect(report.mapping).toMatchObject({
      ...{ station: { from: 'column', column: 0 }, date: { columns: [1, 2], order: 'ymd' } },
      ...{ value: { column: 3 }, flag: null },
    });
    expect(report.stations[0]).toMatchObject({ code: '007', values: 120, missing: 0, gaps: 0 });
    expect(Object.keys(days)).toHaveLength(120);
    expect(days['2001-03-14']).toEqual([3.14, '']);
    expect(days['2001-04-30']).toEqual([4.3, '']);
  });

  test('readFlows keeps 29 February of leap years', async () => {
    const { days } = await read(csv([header, ['A', '2000', '2', ...month(2000, 2)]]), { unit: 'm3/s' });
    expect(Object.keys(days)).toHaveLength(29);
    expect(days['2000-02-29']).toEqual([2.29, '']);
  });

  test.each([
    ['31 April', 4, 30, '5.5', '“5.5” stands on 2001-04-31, which is no day of the calendar'],
    ['29 February of a common year', 2, 28, '0', '“0” stands on 2001-02-29, which is no day of the calendar'],
    ['text on a day', 4, 0, 'high', '“high” on 2001-04-01 is not a flow'],
  ])(
    'readFlows rejects a cell by row, text and reason, and takes the others: %s',
    async (_, number, at, text, reason) => {
      const cells = month(2001, number);
      cells[at] = text;
      const rows = [
        ['A', '2001', String(number), ...cells],
        ['A', '2001', '5', ...month(2001, 5)],
      ];
      const { report, days } = await read(csv([header, ...rows]), { unit: 'm3/s' });
      expect(report).toMatchObject({ rows: 2, accepted: 1, rejectedTotal: 1 });
      expect(report.rejected[0]).toMatchObject({ row: 2, reason: `${reason} (the row's other values were taken)` });
      expect(report.rejected[0].text).toContain(text);
      expect(Object.keys(days)).toHaveLength(31 + daysInMonth(2001, number) - (at === 0 ? 1 : 0));
    },
  );

  test('readFlows takes words for missing on days that do not exist as nothing, elsewhere as missing', async () => {
    const cells = month(2001, 4);
    cells[4] = '-999';
    cells[30] = '-999';
    const { report, days } = await read(csv([header, ['A', '2001', '4', ...cells]]), { unit: 'm3/s' });
    expect(report).toMatchObject({ accepted: 1 });
    expect(days['2001-04-05']).toEqual([Number.NaN, '-999']);
    expect(Object.keys(days)).toHaveLength(30);
  });

  test('readFlows reads a flag behind each day, and leaves totals and means out by their headings', async () => {
    const names = ['ID', 'YEAR', 'MONTH', ...DAYS.flatMap((day) => [`FLOW${day}`, `SYMBOL${day}`]), 'TOTAL', 'MEAN'];
    const cells = month(2001, 6, (day) => [flow(6, day), day === 2 ? 'e' : 'A']);
    const { report, parts, days } = await read(csv([names, ['X1', '2001', '6', ...cells, '999', '33.3']]), {
      unit: 'ft3/s',
    });
    expect(report).toMatchObject({ layout: 'month-rows', rows: 1, accepted: 1, rejected: [] });
    expect(report.mapping).toMatchObject({ value: { column: 3 }, flag: { column: 4 } });
    expect(days['2001-06-01']).toEqual([6.01, 'A']);
    expect(days['2001-06-02']).toEqual([6.02, 'e']);
    expect(parts[0].codeList.map(({ bits }) => bits)).toEqual([0, FLAG.estimated]);
    expect(Object.keys(days)).toHaveLength(30);
  });

  test.each([
    ['2001-06', '2001-07'],
    ['06/2001', '07/2001'],
    ['200106', '200107'],
    ['Jun 2001', 'Jul 2001'],
    ['2001-06-01', '2001-07-01'],
  ])('readFlows reads year and month from one column: %s', async (june, july) => {
    const text = csv([
      ['month', ...DAYS.map((day) => `D${day}`)],
      [june, ...month(2001, 6)],
      [july, ...month(2001, 7)],
    ]);
    const { report, days } = await read(text, { unit: 'L/s' });
    expect(report.mapping.date).toEqual({ columns: [0], order: 'ymd' });
    expect(Object.keys(days)).toHaveLength(61);
    expect(days['2001-07-31']).toEqual([7.31, '']);
  });

  test('readFlows reads months by name under a line that names their year, and leaves lines of totals out', async () => {
    const block = (year: number) => [
      [`Jahr ${year}`],
      ['Monat', ...DAYS.map(String)],
      ...GERMAN.map((name, at) => [name, ...month(year, at + 1)]),
      ['Mittel', ...DAYS.map(() => '9')],
    ];
    const { report, days } = await read(csv([['Pegel: Mühlbach'], ...block(2000), ...block(2001)], ';'), {
      unit: 'm3/s',
    });
    expect(report).toMatchObject({ layout: 'month-rows', rows: 24, accepted: 24, rejected: [] });
    expect(report.mapping.date).toEqual({ columns: [0], order: 'ymd', year: 'heading' });
    expect(Object.keys(days)).toHaveLength(731);
    expect(days['2000-02-29']).toEqual([2.29, '']);
    expect(days['2001-12-31']).toEqual([12.31, '']);
  });

  test('readFlows reads rows without a header, by what they hold', async () => {
    const rows = [1, 2, 3, 4, 5].map((number) => ['0101', '1999', String(number), ...month(1999, number)]);
    const { report, parts } = await read(csv(rows, '\t'), { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'month-rows', rows: 5, accepted: 5 });
    expect(parts[0].code).toBe('0101');
    expect(Object.keys(daysOf(parts[0]))).toHaveLength(151);
  });

  test('readFlows reads rows set apart by blanks while their words can be counted, and rejects those that cannot', async () => {
    const words = (number: number, days: number) =>
      `2001 ${number} ${DAYS.slice(0, days)
        .map((day) => flow(number, day))
        .join('  ')}`;
    const text = `year month ${DAYS.join(' ')}\n${words(1, 31)}\n${words(4, 30)}\n${words(5, 30)}\n`;
    const { report, days } = await read(text, { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'month-rows', rows: 3, accepted: 2, rejectedTotal: 1 });
    expect(report.rejected[0].reason).toMatch(/32 fields set apart by blanks/);
    expect(Object.keys(days)).toHaveLength(61);
  });

  test('readFlows tells several stations apart, and refuses one that the registry does not know', async () => {
    const rows = ['A', 'B'].map((code) => [code, '2001', '1', ...month(2001, 1)]);
    const { parts } = await read(csv([header, ...rows]), { unit: 'm3/s' });
    expect(parts.map(({ code, values }) => [code, values.length])).toEqual([
      ['A', 31],
      ['B', 31],
    ]);
    const error = await refusal(csv([header, ...rows]), { unit: 'm3/s', knownStations: [{ code: 'A', name: '' }] });
    expect(error.problem).toMatchObject({ row: 3, value: 'B', needs: 'station' });
  });

  test('readFlows names both rows of a month that stands twice with unlike values', async () => {
    const other = month(2001, 1);
    other[9] = '77';
    const error = await refusal(csv([header, ['A', '2001', '1', ...month(2001, 1)], ['A', '2001', '1', ...other]]), {
      unit: 'm3/s',
    });
    expect(error.problem.message).toContain('2001-01-10: 1.1 in row 2 and 77 in row 3');
  });
});

describe('a row a day', () => {
  const header = ['Day', ...MONTHS];

  test('readFlows reads 12 columns of months in blocks under lines that name their year', async () => {
    const text = csv([
      ['Year 2000'],
      header,
      ...yearOfDays(2000),
      ['Total', ...MONTHS.map(() => '99')],
      ['Mean', ...MONTHS.map(() => '3')],
      [],
      ['Year 2001'],
      header,
      ...yearOfDays(2001),
    ]);
    const { report, days } = await read(text, { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'day-rows', rows: 62, accepted: 62, rejected: [] });
    expect(report.mapping.date).toEqual({ columns: [0], order: 'ymd', year: 'heading' });
    expect(Object.keys(days)).toHaveLength(731);
    expect(days['2000-02-29']).toEqual([2.29, '']);
    expect(days['2001-11-30']).toEqual([11.3, '']);
    expect(report.stations[0]).toMatchObject({ values: 731, gaps: 0 });
  });

  test.each([
    ['a bare year', '1987'],
    ['a key', 'Year: 1987'],
    ['a sentence', 'Daily mean flow, year 1987'],
    ['other languages', 'Año 1987'],
    ['a comment', '# Jahr 1987'],
  ])('readFlows takes the year of the file from the line above it: %s', async (_, line) => {
    const { report, days } = await read(`${line}\n${csv([header, ...yearOfDays(1987)])}`, { unit: 'm3/s' });
    expect(report).toMatchObject({ rows: 31, accepted: 31 });
    expect(Object.keys(days)).toHaveLength(365);
    expect(days['1987-05-01']).toEqual([5.01, '']);
  });

  test('readFlows takes the year from a column', async () => {
    const rows = [1999, 2000].flatMap((year) => yearOfDays(year).map((row) => [String(year), ...row]));
    const { report, days } = await read(csv([['year', 'day', ...MONTHS], ...rows]), { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'day-rows', rows: 62, accepted: 62 });
    expect(report.mapping.date).toEqual({ columns: [0, 1], order: 'ymd' });
    expect(Object.keys(days)).toHaveLength(731);
  });

  test('readFlows turns to the year of a comment line between blocks', async () => {
    const blocks = [1999, 2000].map((year) => `# Year ${year}\n${csv([header, ...yearOfDays(year)])}`);
    const { report, days } = await read(blocks.join('\n'), { unit: 'm3/s' });
    expect(report).toMatchObject({ rows: 62, accepted: 62 });
    expect(Object.keys(days)).toHaveLength(731);
  });

  test('readFlows asks for the year where nothing says it, and reads with the one that is given', async () => {
    const text = csv([header, ...yearOfDays(1987)]);
    const error = await refusal(text, { unit: 'm3/s' });
    expect(error.problem).toMatchObject({ needs: 'mapping', file: 'gauge.csv' });
    expect(error.problem.message).toMatch(/no line above the rows, says their year/);
    const date: Mapping['date'] = { columns: [0], order: 'ymd', year: 1987 };
    const { days } = await read(text, { unit: 'm3/s', mapping: { layout: 'day-rows', date } });
    expect(Object.keys(days)).toHaveLength(365);
  });

  test('readFlows rejects a value on 30 February by its cell', async () => {
    const rows = yearOfDays(2001);
    rows[29][2] = '1.5';
    const { report, days } = await read(`2001\n${csv([header, ...rows])}`, { unit: 'm3/s' });
    expect(report).toMatchObject({ rows: 31, accepted: 30, rejectedTotal: 1 });
    expect(report.rejected[0]).toMatchObject({
      row: 32,
      reason: "“1.5” stands on 2001-02-30, which is no day of the calendar (the row's other values were taken)",
    });
    expect(Object.keys(days)).toHaveLength(365);
  });

  const WATER = [10, 11, 12, 1, 2, 3, 4, 5, 6, 7, 8, 9];
  const waterHeader = ['Day', ...WATER.map((number) => MONTHS[number - 1])];

  test.each([
    ['Water year 2001', 2000],
    ['2000/01', 2000],
    ['Year 2000-2001', 2000],
    ['Hydrologisches Jahr 2001', 2000],
  ])('readFlows counts years that begin in October as their heading has them: %s', async (line, first) => {
    const { days } = await read(`${line}\n${csv([waterHeader, ...yearOfDays(2000, WATER, first)])}`, { unit: 'm3/s' });
    expect(Object.keys(days)).toHaveLength(365);
    expect(Object.keys(days)[0]).toBe('2000-10-01');
    expect(days['2001-09-30']).toEqual([9.3, '']);
  });

  test('readFlows asks which year names one that begins in October, where nothing says it', async () => {
    const text = `2001\n${csv([waterHeader, ...yearOfDays(2001, WATER, 2001)])}`;
    const error = await refusal(text, { unit: 'm3/s' });
    expect(error.problem).toMatchObject({ needs: 'mapping' });
    expect(error.problem.remedy).toContain('"yearBegins"');
    const date = (named: 'first' | 'last'): Mapping['date'] => ({
      ...{ columns: [0], order: 'ymd', year: 'heading' },
      yearBegins: { month: 10, named },
    });
    const first = await read(text, { unit: 'm3/s', mapping: { date: date('first') } });
    expect(Object.keys(first.days)[0]).toBe('2001-10-01');
    const last = await read(text, { unit: 'm3/s', mapping: { date: date('last') } });
    expect(Object.keys(last.days)[0]).toBe('2000-10-01');
  });

  test('readFlows reads right-aligned columns whose empty cells are blanks', async () => {
    const line = (cells: string[]) => cells.map((cell, at) => cell.padStart(at === 0 ? 4 : 8)).join('');
    const text = ['Station number: 0306', 'Units: cfs', 'Year 2001', line(header), ...yearOfDays(2001).map(line)].join(
      '\n',
    );
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'day-rows', unit: 'ft3/s', rows: 31, accepted: 31, rejected: [] });
    expect(report.mapping).toMatchObject({ date: { columns: [[0, 4]] }, value: { slice: [4, 12] } });
    expect(parts[0].code).toBe('0306');
    expect(Object.keys(days)).toHaveLength(365);
    expect(days['2001-12-31']).toEqual([12.31, '']);
    // The mapping alone gives the same again.
    const again = await read(text, { mapping: report.mapping });
    expect(again.days).toEqual(days);
  });

  test('readFlows turns to another station where a block names it by number, and refuses one of another name', async () => {
    const block = (code: string) => [[`Station number: ${code}`], ['Year 2001'], header, ...yearOfDays(2001)];
    const { parts } = await read(csv([...block('12'), ...block('34')]), { unit: 'm3/s' });
    expect(parts.map(({ code, values }) => [code, values.length])).toEqual([
      ['12', 365],
      ['34', 365],
    ]);
    const error = await refusal(csv([...block('12'), ...block('34')]), { unit: 'm3/s', station: 'X' });
    expect(error.problem).toMatchObject({ row: 35, value: '34', needs: 'station' });
  });
});

test('readFlows reads rows of months, October first, under a line that names a hydrological year', async () => {
  const order = [10, 11, 12, 1, 2, 3, 4, 5, 6, 7, 8, 9];
  const rows = order.map((number) => [String(number), ...month(number >= 10 ? 2000 : 2001, number)]);
  const table = csv([['month', ...DAYS.map(String)], ...rows]);
  const { report, days } = await read(`Water year 2001\n${table}`, { unit: 'm3/s' });
  expect(report.mapping.date.yearBegins).toEqual({ month: 10, named: 'last' });
  expect(Object.keys(days)).toHaveLength(365);
  expect(Object.keys(days)[0]).toBe('2000-10-01');
  const error = await refusal(`2001\n${table}`, { unit: 'm3/s' });
  expect(error.problem.message).toMatch(/the years do not begin in January/);
});

test('readFlows asks for the century of two-digit years, and reads them with the first year given', async () => {
  const text = csv([
    ['year', 'month', ...DAYS.map(String)],
    ['98', '1', ...month(1998, 1)],
  ]);
  expect((await refusal(text, { unit: 'm3/s' })).problem).toMatchObject({ needs: 'century', value: '98' });
  const { days } = await read(text, { unit: 'm3/s', mapping: { firstYear: 1930 } });
  expect(Object.keys(days)[0]).toBe('1998-01-01');
});

test('readFlows rejects the cell in which a line of fixed characters ends early', async () => {
  const line = (cells: string[]) => cells.map((cell, at) => cell.padStart(at === 0 ? 4 : 8)).join('');
  const lines = ['Year 2001', line(['Day', ...MONTHS]), ...yearOfDays(2001).map(line)];
  const { report, days } = await read(lines.join('\n').slice(0, -2), { unit: 'm3/s' });
  expect(report.rejected[0]).toMatchObject({ row: 33, reason: expect.stringMatching(/on 2001-12-31 is cut short/) });
  expect(Object.keys(days)).toHaveLength(364);
});

test('a mapping may call any table a calendar: what it leaves open is asked', async () => {
  const text = csv([
    ['a', 'b', ...DAYS.map((day) => `x${day}y`)],
    ['2001', '1', ...month(2001, 1)],
  ]);
  const seen = await inspect(text, { unit: 'm3/s', mapping: { layout: 'month-rows' } });
  expect(seen.mapping?.layout).toBe('month-rows');
  expect(seen.problems.map(({ problem }) => problem.needs)).toEqual(['mapping']);
  const date: Mapping['date'] = { columns: [0, 1], order: 'ymd' };
  const value = await inspect(text, { unit: 'm3/s', mapping: { layout: 'month-rows', date } });
  expect(value.problems.map(({ message }) => message).join()).toMatch(/no column is known to hold the first day/);
  const { days } = await read(text, { unit: 'm3/s', mapping: { layout: 'month-rows', date, value: { column: 2 } } });
  expect(days['2001-01-31']).toEqual([1.31, '']);
});

test('inspectFile of a calendar layout says how it is read, and its mapping reads it', async () => {
  const text = `Year 2001\n${csv([['Day', ...MONTHS], ...yearOfDays(2001)])}`;
  const seen = await inspect(text, { unit: 'm3/s' });
  expect(seen.problems).toEqual([]);
  expect(seen.mapping).toMatchObject({ layout: 'day-rows', value: { column: 1 }, unit: 'm3/s' });
  expect(seen.preview[0]).toEqual(['Day', ...MONTHS]);
});

test('a wide table with year, month and day in columns and stations called 1 to 12 or 31 stays one', async () => {
  for (const stations of [12, 31]) {
    const names = Array.from({ length: stations }, (_, at) => String(at + 1));
    const rows = [1, 2, 3, 4].map((day) => ['2001', '5', String(day), ...names]);
    const { report } = await read(csv([['year', 'month', 'day', ...names], ...rows]), { unit: 'm3/s' });
    expect(report.layout).toBe('wide');
    expect(report.stations).toHaveLength(stations);
  }
});

test('a wide table of stations that are called by numbers stays one', async () => {
  const text = csv([
    ['date', ...DAYS.map(String)],
    ...['2001-05-03', '2001-05-04', '2001-05-05'].map((date) => [date, ...DAYS.map(String)]),
  ]);
  const { report } = await read(text, { unit: 'm3/s' });
  expect(report.layout).toBe('wide');
  expect(report.stations).toHaveLength(31);
});
