import { describe, expect, test } from 'vitest';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import { read, refusal, withFile } from '../reading.ts';

const needsOf = (text: string, options = {}) =>
  withFile(text, async (path) =>
    (await inspectFile(path, { fileName: 'gauge.csv', ...options })).problems.map(({ problem }) => problem.needs),
  );

describe('months by name', () => {
  test.each([
    ['English', ['03-Jan-2001', '04-Feb-2001', '05-Dec-2001']],
    ['German', ['3. Jan. 2001', '4. Februar 2001', '5. Dez. 2001']],
    ['French', ['3 janv. 2001', '4 févr. 2001', '5 déc. 2001']],
    ['Spanish', ['03/ene/2001', '04/feb/2001', '05/dic/2001']],
    ['Portuguese', ['3 de janeiro de 2001', '4 de fevereiro de 2001', '5 de dezembro de 2001']],
    ['Swedish', ['3 januari 2001', '4 februari 2001', '5 december 2001']],
    ['month first', ['"Jan 3, 2001"', '"Feb 4, 2001"', '"Dec 5, 2001"']],
  ])('readFlows reads dates with names of months, and asks for no order: %s', async (_, texts) => {
    const text = `date,flow_m3s\n${texts.map((date, at) => `${date},${at}`).join('\n')}\n`;
    const { report, days } = await read(text);
    expect(report).toMatchObject({ rows: 3, accepted: 3, rejected: [] });
    expect(Object.keys(days).filter((date) => days[date])).toEqual(['2001-01-03', '2001-02-04', '2001-12-05']);
  });

  test('readFlows reads a month by name in a column of its own', async () => {
    const { report, days } = await read('year,month,day,flow_m3s\n2001,Jan,3,1\n2001,März,4,2\n');
    expect(report).toMatchObject({ rows: 2, accepted: 2 });
    expect(Object.keys(days)).toEqual(['2001-01-03', '2001-03-04']);
  });

  test('readFlows rejects a name that is no month’s, with the text', async () => {
    const { report } = await read('date,flow_m3s\n03-Jan-2001,1\n03-Jam-2001,2\n');
    expect(report.rejected[0]).toMatchObject({ row: 3, reason: '“03-Jam-2001” is not a date' });
  });
});

describe('years of two digits', () => {
  // No month has 99 days, so the year is behind.
  const text = 'date,flow_m3s\n13/01/29,1\n14/01/99,2\n';

  test('readFlows asks for the century and never guesses it', async () => {
    const error = await refusal(text);
    expect(error.problem).toMatchObject({ needs: 'century', value: '13/01/29', file: 'gauge.csv' });
    expect(error.problem.remedy).toContain('{"firstYear": 1930}');
    expect(await needsOf(text)).toEqual(['century']);
    expect(await needsOf('date,flow_m3s\n03-Jan-29,1\n04-Jan-29,1\n')).toEqual(['century']);
    expect(await needsOf('year,month,day,flow_m3s\n29,1,3,1\n29,1,4,1\n')).toEqual(['century']);
  });

  test('readFlows reads them with the first year given', async () => {
    const { days } = await read(text, { mapping: { firstYear: 1930 } });
    expect(Object.keys(days).filter((date) => days[date])).toEqual(['1999-01-14', '2029-01-13']);
    const names = await read('date,flow_m3s\n03-Jan-99,1\n04-Jan-99,1\n', { mapping: { firstYear: 1900 } });
    expect(Object.keys(names.days)).toEqual(['1999-01-03', '1999-01-04']);
    const columns = await read('year,month,day,flow_m3s\n99,1,3,1\n0,1,4,1\n', { mapping: { firstYear: 1950 } });
    expect(Object.keys(columns.days)).toEqual(['1999-01-03', '2000-01-04']);
  });

  test('readFlows rejects single rows with a short year among full ones', async () => {
    const { report } = await read('date,flow_m3s\n13/01/2001,1\n14/01/2001,2\n15/01/01,2\n');
    expect(report.rejected[0]).toMatchObject({ row: 4, reason: '“15/01/01” has a year of fewer than four digits' });
  });

  test('readFlows finds year first where no other order fits, and asks where several do', async () => {
    const { report } = await read('date,flow_m3s\n98-01-13,1\n98-01-14,2\n', { mapping: { firstYear: 1930 } });
    expect(report.mapping.date.order).toBe('ymd');
    const error = await refusal('date,flow_m3s\n01-02-03,1\n02-03-04,2\n', { mapping: { firstYear: 1930 } });
    expect(error.problem).toMatchObject({ needs: 'date-order', value: '01-02-03' });
  });
});

describe('times beside dates', () => {
  test.each([
    ['midnight', ['2001-01-30 00:00', '2001-01-31 00:00']],
    ['a constant hour', ['2001-01-30T09:00:00', '2001-01-31T09:00:00']],
    ['before and after noon', ['1/30/2001 12:00:00 AM', '1/31/2001 12:00:00 AM']],
    ['a named zone', ['2001-01-30 00:00 UTC', '2001-01-31 00:00 UTC']],
  ])('readFlows reads one value a day at %s', async (_, texts) => {
    const { report, days } = await read(`datetime,flow_m3s\n${texts.map((date) => `${date},1.5`).join('\n')}\n`);
    expect(report).toMatchObject({ rows: 2, accepted: 2, rejected: [] });
    expect(Object.keys(days)).toEqual(['2001-01-30', '2001-01-31']);
  });
});

test('readFlows refuses dates in two orders, naming both rows', async () => {
  const error = await refusal('date,flow_m3s\n1/2/2001,3\n13/1/2001,5\n2/3/2001,4\n1/14/2001,5\n');
  expect(error.problem).toMatchObject({ needs: 'date-order', row: 5, value: '1/14/2001' });
  expect(error.problem.message).toBe(
    'dates contradict one another: “13/1/2001” in row 3 can only be day, month, year, “1/14/2001” in row 5 only month, day, year',
  );
  const said = await read('date,flow_m3s\n13/1/2001,5\n1/14/2001,5\n', {
    mapping: { date: { columns: [0], order: 'dmy' } },
  });
  expect(said.report).toMatchObject({ accepted: 1, rejectedTotal: 1 });
  expect(said.report.rejected[0].reason).toMatch(/in another order than the rest of the file/);
});
