import { describe, expect, test } from 'vitest';
import { IntakeError } from '../../../lib/intake/types.ts';
import { dates, expectSaysAll, read, refusal } from './reading.ts';

const GOOD = 'station,date,flow_m3s,flag\nA,2001-01-01,1.5,A\nA,2001-01-02,2.5,A\n';

const utf16 = (text: string) => Buffer.from(`\uFEFF${text}`, 'utf16le');

describe('files that are refused', () => {
  test.each([
    ['an empty file', '', { message: /empty/ }],
    ['blank lines only', '\n \n\n', { message: /nothing but blank lines/ }],
    ['comments only', '# a\n# b\n', { message: /nothing but comment/ }],
    ['UTF-16 with its mark', utf16(GOOD), { message: /UTF-16/, row: 1, value: 'FF FE at the start' }],
    ['UTF-16 big-endian', Buffer.from(utf16(GOOD)).swap16(), { message: /UTF-16/, value: 'FE FF at the start' }],
    ['UTF-16 without its mark', Buffer.from(GOOD, 'utf16le'), { message: /UTF-16/ }],
    ['a binary file', Buffer.from([0x7f, 0x45, 0x4c, 0x46, 10, 2, 1, 1, 7, 10]), { message: /binary/, row: 2 }],
    ['a ZIP archive', Buffer.from([0x50, 0x4b, 3, 4, 20, 0, 0, 0]), { message: /archive/ }],
    ['JSON', '{"flows": []}', { message: /JSON/, row: 1 }],
    ['XML', '<?xml version="1.0"?>\n<a/>', { message: /XML/, row: 1 }],
    ['a header and nothing else', 'station,date,flow_m3s,flag\n', { message: /no rows of data/, row: 1 }],
    ['a table without dates', 'a,b,c\n1,2,3\n4,5,6\n', { message: /no dates/, needs: 'mapping' }],
    ['text without a table', 'hello\nworld\n', { message: /no dates/, needs: 'mapping' }],
  ])('readFlows refuses %s', async (_, content, expected) => {
    const error = await refusal(content);
    expectSaysAll(error);
    const { message, ...rest } = expected as { message: RegExp };
    expect(error.problem.message).toMatch(message);
    expect(error.problem).toMatchObject(rest);
  });

  test('readFlows refuses Latin-1 text marked as UTF-8, naming the row', async () => {
    const body = Buffer.from('station,date,flow_m3s\nA,2001-01-01,1\nMühle,2001-01-01,2\n', 'latin1');
    const error = await refusal(Buffer.concat([Buffer.from([0xef, 0xbb, 0xbf]), body]));
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 3, value: 'Mühle,2001-01-01,2' });
  });

  test('readFlows refuses a station that the registry does not know, naming it and its row', async () => {
    const knownStations = [{ code: 'B', name: 'Bee' }];
    const error = await refusal(GOOD, { knownStations });
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 2, value: 'A', needs: 'station' });
    const wide = await refusal('date,B,X9\n2001-01-01,1,2\n', {
      knownStations,
      unit: 'm3/s',
      mapping: { layout: 'wide' },
    });
    expect(wide.problem).toMatchObject({ row: 1, value: 'X9' });
    const named = await refusal('date,flow_m3s\n2001-01-01,1\n', { knownStations });
    expect(named.problem).toMatchObject({ value: 'gauge', needs: 'station' });
  });

  test('readFlows asks about codes that differ by case or leading zeros, all pairs named, and matches them on demand', async () => {
    const text = 'station,date,flow_m3s\n1013500,2001-01-01,1\nab7,2001-01-01,2\n';
    const knownStations = ['01013500', 'AB7', 'C'].map((code) => ({ code, name: '' }));
    const { problem } = await refusal(text, { knownStations });
    expect(problem).toMatchObject({ row: 2, value: '1013500', needs: 'codes' });
    expect(problem.pairs).toEqual([
      { written: '1013500', registered: '01013500' },
      { written: 'ab7', registered: 'AB7' },
    ]);
    expect(problem.message).toContain('“1013500” for “01013500”, “ab7” for “AB7”');
    const { parts, report } = await read(text, { knownStations, matchCodes: true });
    expect(parts.map(({ code }) => code)).toEqual(['01013500', 'AB7']);
    expect(report.warnings).toEqual([expect.stringContaining('“1013500” as “01013500”')]);
  });

  test('readFlows matches no code that may be two stations of the registry', async () => {
    const knownStations = ['0012', '012'].map((code) => ({ code, name: '' }));
    const error = await refusal('station,date,flow_m3s\n12,2001-01-01,1\n', { knownStations, matchCodes: true });
    expect(error.problem).toMatchObject({ value: '12', needs: 'station' });
    expect(error.problem.remedy).toContain('“0012”');
  });

  test('readFlows names codes of one file that differ only by case or leading zeros', async () => {
    const { report } = await read(
      'station,date,flow_m3s\nA1,2001-01-01,1\na1,2001-01-01,2\n0A1,2001-01-01,3\nB,2001-01-01,3\n',
    );
    expect(report.warnings).toEqual([expect.stringContaining('“A1” and “a1” and “0A1”')]);
  });

  test.each([
    ['in a plain row', 'A,2001-01-01,1.6,A', '1.6'],
    ['in a quoted row', '"A","2001-01-01","1.25","A"', '1.25'],
  ])('readFlows refuses unlike values for one day, naming both rows: %s', async (_, row, value) => {
    const error = await refusal(`${GOOD}B,2001-01-01,9,A\n${row}\n`);
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 5, value });
    expect(error.problem.message).toBe(
      `station A has two unlike values for 2001-01-01: 1.5 in row 2 and ${value} in row 5`,
    );
  });

  test('readFlows refuses a 3 MB single line without reading on, also behind good rows', async () => {
    const long = 'x'.repeat(3 << 20);
    const first = await refusal(long);
    expectSaysAll(first);
    expect(first.problem).toMatchObject({ row: 1 });
    expect(first.problem.message).toMatch(/longer than 1024 kB/);
    const later = await refusal(`${GOOD}${long}\n`);
    expect(later.problem).toMatchObject({ row: 4 });
    const afterHeader = await refusal(`date,flow_m3s\n${'1'.repeat(3 << 20)}`);
    expect(afterHeader.problem).toMatchObject({ row: 2, value: `${'1'.repeat(40)}…` });
    expect(afterHeader.problem.message).toMatch(/longer than/);
  });

  test('readFlows refuses a file of which no row can be read, with the first reason', async () => {
    const error = await refusal('date,flow_m3s\n2001-02-31,1\n2001-02-30,2\n');
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 2, value: '2001-02-31,1' });
    expect(error.problem.message).toMatch(/not a day of the calendar/);
  });

  test('readFlows refuses a column of flags with more texts than flags can be', async () => {
    const rows = dates('2001-01-01', 300).map((date, at) => `${date},1,note ${at}`);
    const error = await refusal(`date,flow_m3s,flag\n${rows.join('\n')}\n`);
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 257, value: 'note 255', needs: 'mapping' });
  });

  test('readFlows refuses a missing file and a folder without naming its path', async () => {
    const { readFlows } = await import('../../../lib/intake/read-flows.ts');
    for (const path of ['/nowhere/at/all', '/']) {
      const error = await readFlows(path, { fileName: 'gauge.csv', emit() {} }).catch((problem: unknown) => problem);
      expect(error).toBeInstanceOf(IntakeError);
      expect((error as IntakeError).message).toMatch(/^gauge\.csv: /);
      expect((error as IntakeError).message).not.toContain('nowhere');
    }
  });
});

describe('files that leave a question open', () => {
  test('readFlows asks for a unit that nothing names', async () => {
    const error = await refusal('date,flow\n2001-01-01,1\n');
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'unit', value: 'flow' });
  });

  test('readFlows asks for the date order when every date can be read both ways', async () => {
    const error = await refusal('date,flow_m3s\n1/2/2001,1\n2/2/2001,1\n12/11/2001,3\n');
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'date-order', value: '1/2/2001' });
    const { days } = await read('date,flow_m3s\n1/2/2001,1\n2/2/2001,1\n', {
      mapping: { date: { columns: [0], order: 'mdy' } },
    });
    expect(Object.keys(days)).toEqual(['2001-01-02', '2001-02-02']);
  });

  test('readFlows finds the date order by one date far down the file, and refuses dates that contradict it', async () => {
    const many = Array.from(
      { length: 70_000 },
      (_, at) => `${(at % 12) + 1}/${(at % 11) + 1}/${1800 + Math.floor(at / 400)},`,
    );
    const { report } = await read(`date,flow_m3s\n${many.join('\n')}\n13/1/2001,5\n`);
    expect(report.mapping.date.order).toBe('dmy');
    expect(report.stations[0]).toMatchObject({ values: 1, first: '2001-01-13' });
    const error = await refusal('date,flow_m3s\n13/1/2001,5\n1/14/2001,5\n');
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'date-order', row: 3, value: '1/14/2001' });
  });

  test('readFlows asks which of several columns holds the flows', async () => {
    const error = await refusal('station,date,a,b\nX,2001-01-01,1,2\n', { unit: 'm3/s' });
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'mapping' });
  });

  test('readFlows refuses a mapping that names a column which is not there', async () => {
    const error = await refusal(GOOD, { mapping: { value: { column: 'discharge' } } });
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'mapping', value: 'discharge' });
    expect(error.problem.remedy).toContain('flow_m3s');
  });
});

describe('rows that are rejected, and named', () => {
  test.each([
    ['text in the flow column', 'A,2001-01-03,lots,A', /“lots” is not a flow/],
    ['31 February', 'A,2001-02-31,3,A', /“2001-02-31” is not a day/],
    ['a year out of reach', 'A,0201-02-03,3,A', /outside 1700–2199/],
    ['no date', 'A,,3,A', /no date/],
    ['no station', ',2001-01-03,3,A', /no station/],
    ['a row cut short', 'A,2001-01-0', /2 of 4 fields/],
    ['a row cut short in its value', 'A,2001-01-03,3', /3 of 4 fields/],
    ['a decimal comma among commas', 'A,2001-01-03,3,5,A', /5 fields where the header has 4/],
    ['a quote left open', 'A,2001-01-03,"3,A', /quoted field is not closed/],
    ['a line of text', 'Total of 2 rows', /1 of 4 fields/],
  ])('readFlows rejects %s and takes the others', async (_, row, reason) => {
    for (const end of ['', '\n', '\r\n']) {
      const { report, parts } = await read(`${GOOD}${row}${end}`);
      expect(report).toMatchObject({ rows: 3, accepted: 2, rejectedTotal: 1 });
      expect(report.rejected[0]).toMatchObject({ row: 4, text: row });
      expect(report.rejected[0].reason).toMatch(reason);
      expect([...parts[0].values]).toEqual([1.5, 2.5]);
    }
  });

  test('readFlows rejects a fixed-width row that was cut', async () => {
    const lines = dates('1990-10-10', 30).map(
      (date, at) => `${date.replaceAll('-', '')}${'0.5'.padStart(8)}${String(at).padStart(8)}`,
    );
    const text = lines.join('\n').slice(0, -5);
    const { report } = await read(text, { mapping: { value: { slice: [16, 24] }, unit: 'mm/d' } });
    expect(report).toMatchObject({ rows: 30, accepted: 29, rejectedTotal: 1 });
    expect(report.rejected[0]).toMatchObject({ row: 30, reason: expect.stringMatching(/cut short/) });
  });
});
