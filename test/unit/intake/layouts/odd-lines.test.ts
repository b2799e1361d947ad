import { describe, expect, test } from 'vitest';
import { dates, read, refusal } from '../reading.ts';

const HEADER = 'date,flow_m3s';
const rows = (...lines: string[]) => `${HEADER}\n${lines.join('\n')}\n`;

describe('lines between and behind the rows', () => {
  test('readFlows skips the header where it stands again, and says how often', async () => {
    const { report } = await read(rows('2001-01-01,1', HEADER, '2001-01-02,2', HEADER, '2001-01-03,3'));
    expect(report).toMatchObject({ rows: 3, accepted: 3, rejectedTotal: 0 });
    expect(report.warnings).toContain('The header stands again 2 times between the rows; those lines were skipped.');
  });

  test('readFlows takes a row of units under the header for the unit', async () => {
    const { report } = await read('date;flow;stage\n;m³/s;cm\n2001-01-01;1,5;30\n2001-01-02;2,5;40\n');
    expect(report).toMatchObject({ unit: 'm3/s', rows: 2, accepted: 2, rejected: [] });
    const wide = await read('date,A1,B2\n,L/s,L/s\n2001-01-01,1,2\n2001-01-02,3,4\n');
    expect(wide.report).toMatchObject({ layout: 'wide', unit: 'L/s', rows: 2, accepted: 2 });
  });

  test('readFlows refuses a header with other columns, which would move every value below it', async () => {
    const text = 'date,A,B\n2001-01-01,1,2\ndate,B,A\n2001-01-02,1,2\n';
    const error = await refusal(text, { unit: 'm3/s' });
    expect(error.problem).toMatchObject({ row: 3, value: 'date, B, A' });
    expect(error.problem.message).toContain('the columns are others than those of the first header (date, A, B)');
  });

  test('readFlows keeps a footer that looks like a header for a row that is rejected', async () => {
    const { report } = await read(rows('2001-01-01,1', '2001-01-02,2', 'Data provider,Office'));
    expect(report).toMatchObject({ accepted: 2, rejectedTotal: 1 });
  });

  test.each([
    ['End of file', /1 of 2 fields/],
    ['Total,6', /“Total” is not a date/],
    ['Mean,2.0', /“Mean” is not a date/],
    ['2 rows exported on 2001-02-03', /1 of 2 fields/],
    ['Daily flows of the Mill Brook', /1 of 2 fields/],
  ])('readFlows rejects a line that is no row, and names it: %s', async (line, reason) => {
    const { report } = await read(rows('2001-01-01,1', '2001-01-02,2', line));
    expect(report).toMatchObject({ rows: 3, accepted: 2, rejectedTotal: 1 });
    expect(report.rejected[0]).toMatchObject({ row: 4, text: line });
    expect(report.rejected[0].reason).toMatch(reason);
  });
});

describe('words in the column of flows', () => {
  test('readFlows takes no unknown word for missing, also not the letter x', async () => {
    const { report } = await read(rows('2001-01-01,x', '2001-01-02,2', '2001-01-03,X', '2001-01-04,?'));
    expect(report).toMatchObject({ rows: 4, accepted: 2, rejectedTotal: 2 });
    expect(report.rejected.map(({ row, reason }) => [row, reason])).toEqual([
      [2, '“x” is not a flow'],
      [4, '“X” is not a flow'],
    ]);
  });

  test('readFlows takes it where the mapping lists it, and keeps the text', async () => {
    const { report, days } = await read(rows('2001-01-01,x', '2001-01-02,2'), { mapping: { missing: ['x'] } });
    expect(report).toMatchObject({ accepted: 2, rejectedTotal: 0 });
    expect(days['2001-01-01']).toEqual([Number.NaN, 'x']);
  });
});

describe('signs between thousands', () => {
  test.each([
    ['1,234.5', ['"1,234.5"', '"12.25"'], [1234.5, 12.25]],
    ['1.234,5', ['"1.234,5"', '"12,25"'], [1234.5, 12.25]],
    ['1 234', ['1 234', '12.25'], [1234, 12.25]],
    ["1'234.5", ["1'234.5", '12.25'], [1234.5, 12.25]],
  ])('readFlows reads values such as %s', async (_, texts, values) => {
    const { report, parts } = await read(rows(...texts.map((text, at) => `2001-01-0${at + 1},${text}`)));
    expect(report).toMatchObject({ rows: 2, accepted: 2, rejected: [] });
    expect([...parts[0].values]).toEqual(values);
  });

  const open = 'date;flow_m3s\n2001-01-01;1,234\n2001-01-02;999\n2001-01-03;12\n';

  test('readFlows asks whether a comma before three digits is a decimal one, and reads by the answer', async () => {
    const error = await refusal(open);
    expect(error.problem).toMatchObject({ needs: 'thousands', value: '1,234', file: 'gauge.csv' });
    expect(error.problem.remedy).toBe('Say it in a mapping: {"decimal": ","} or {"thousands": ","}');
    expect([...(await read(open, { mapping: { decimal: ',' } })).parts[0].values]).toEqual([1.234, 999, 12]);
    expect([...(await read(open, { mapping: { thousands: ',' } })).parts[0].values]).toEqual([1234, 999, 12]);
  });

  test('readFlows asks nothing where one value of many shows it', async () => {
    const many = dates('2001-01-01', 400).map((date, at) => `${date};${at === 399 ? '0,5' : '1,234'}`);
    const { report } = await read(`date;flow_m3s\n${many.join('\n')}\n`);
    expect(report.mapping).toMatchObject({ decimal: ',' });
    expect(report.mapping.thousands).toBeUndefined();
  });
});
