import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { strToU8, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import writeXlsxFile from 'write-excel-file/node';
import { IntakeError } from '../../../../lib/intake/types.ts';
import { sheetAsText, workbookSheets } from '../../../../lib/intake/workbook/index.ts';
import { daysOf, read, withFile } from '../reading.ts';
import { handMade, rowOf } from './workbook-parts.ts';

const textOf = (bytes: Uint8Array, options: { sheet?: string; mostRows?: number } = {}) =>
  withFile(bytes, async (path) => {
    const sheet = await sheetAsText(path, { fileName: 'flows.xlsx', ...options });
    if (sheet === null) throw new Error('expected a workbook');
    const lines = (await readFile(sheet.path, 'utf8')).split('\n').slice(0, -1);
    await sheet.dispose();
    expect(existsSync(sheet.path)).toBe(false);
    return { lines, warnings: sheet.warnings, sheet: sheet.sheet };
  });
const refusalOf = async (bytes: Uint8Array, options: { sheet?: string } = {}) => {
  const outcome = await textOf(bytes, options).catch((error: unknown) => error);
  if (!(outcome instanceof IntakeError)) throw new Error(`expected an IntakeError, got ${String(outcome)}`);
  return outcome;
};
const single = (rows: string, more: Partial<Parameters<typeof handMade>[0]> = {}) =>
  handMade({ sheets: [{ name: 'Flows', rows }], ...more });

describe('cells', () => {
  test('shared, inline and rich texts, booleans, errors and numbers are written as they read', async () => {
    const rows = `<row r="1"><c r="A1" t="s"><v>0</v></c><c r="B1" t="s"><v>1</v></c><c r="C1" t="b"><v>1</v></c><c r="D1" t="e"><v>#N/A</v></c><c r="E1"><v>0.1</v></c><c r="F1"><v>9.9999999999999995E-8</v></c><c r="G1" t="str"><f>A1</f><v>text</v></c><c r="H1" t="d"><v>2001-02-03</v></c></row>`;
    const strings = ['<t>date</t>', '<r><t>flow </t></r><r><t>m3/s</t></r><rPh sb="0" eb="1"><t>no</t></rPh>'];
    expect((await textOf(single(rows, { strings }))).lines).toEqual([
      'date\tflow m3/s\tTRUE\t#N/A\t0.1\t1e-7\ttext\t2001-02-03',
    ]);
  });

  test('tabs, line ends and quotes within a cell do not break its line', async () => {
    const rows = `<row r="1"><c r="A1" t="inlineStr"><is><t>a&#9;b&#10;c</t></is></c><c r="B1" t="inlineStr"><is><t>6" pipe</t></is></c></row>`;
    expect((await textOf(single(rows))).lines).toEqual(['a b c\t"6"" pipe"']);
  });

  test('a formula counts by its stored value; one without is named', async () => {
    const rows = `<row r="1"><c r="A1"><f>1+1</f><v>2</v></c><c r="B1"><f>A1*2</f></c><c r="C1"><f>A1*3</f><v/></c></row>`;
    const { lines, warnings } = await textOf(single(rows));
    expect(lines).toEqual(['2\tformula without a stored value\tformula without a stored value']);
    expect(warnings).toEqual([
      '2 formulas have no stored value, the first in B1: open the workbook in a spreadsheet program and save it.',
    ]);
  });

  // Serials by ECMA-376 part 1, 18.17.4.1: in the 1900 system 1 is 1900-01-01 and 61 is 1900-03-01, 44197 is 2021-01-01;
  // in the 1904 system 0 is 1904-01-01, and every date is 1462 less.
  test.each([
    ['yyyy-mm-dd', 1, false, '1900-01-01'],
    ['yyyy-mm-dd', 59, false, '1900-02-28'],
    ['yyyy-mm-dd', 60, false, '1900-02-29'],
    ['yyyy-mm-dd', 61, false, '1900-03-01'],
    ['dd.mm.yyyy', 44197, false, '2021-01-01'],
    ['[$-409]d-mmm-yy;@', 44197, false, '2021-01-01'],
    ['dd/mm/yyyy hh:mm', 44197.5, false, '2021-01-01T12:00:00'],
    ['dd/mm/yyyy hh:mm', 44197, false, '2021-01-01T00:00:00'],
    ['dd/mm/yyyy', 44197.75, false, '2021-01-01T18:00:00'],
    ['dd/mm/yyyy hh:mm', 44197.9999999, false, '2021-01-02T00:00:00'],
    ['hh:mm', 0.25, false, '06:00:00'],
    ['yyyy-mm-dd', 0, true, '1904-01-01'],
    ['yyyy-mm-dd', 42735, true, '2021-01-01'],
    ['0.00', 44197, false, '44197'],
    ['0.00 "m3/s per day"', 44197, false, '44197'],
    ['[h]:mm', 44197, false, '44197'],
    ['General', 44197, false, '44197'],
    ['yyyy-mm-dd', -1, false, '-1'],
    ['00000000', 1491000, false, '01491000'],
  ])('a number in the format %s: %s (from 1904: %s) is %s', async (format, value, from1904, text) => {
    const rows = `<row r="1"><c r="A1" s="1"><v>${value}</v></c></row>`;
    expect((await textOf(single(rows, { formats: [format], from1904 }))).lines).toEqual([text]);
  });

  test('the built-in date format 14 needs no code', async () => {
    expect((await textOf(single('<row r="1"><c r="A1" s="1"><v>44197</v></c></row>'))).lines).toEqual(['2021-01-01']);
  });
});

describe('rows', () => {
  test('rows keep their numbers, empty ones too, and are as wide as those above', async () => {
    const rows = [rowOf(2, ['a', 'b', 'c']), rowOf(5, ['1', null, null]), rowOf(6, [null, '2', null])].join('');
    expect((await textOf(single(rows))).lines).toEqual(['', 'a\tb\tc', '', '', '1\t\t', '\t2\t']);
  });

  test('of a merged block only the first cell counts, whatever the others hold', async () => {
    const rows = [
      rowOf(1, ['Flows of the Ribble', 'stale', 'stale']),
      rowOf(2, ['x', 'stale']),
      rowOf(3, ['a', 'b']),
    ].join('');
    const behind =
      '<mergeCells count="2"><mergeCell ref="A1:C1"/><mergeCell ref="B2:B2"/><mergeCell ref="A2:B2"/></mergeCells>';
    const bytes = handMade({ sheets: [{ name: 'Flows', rows, behind }] });
    expect((await textOf(bytes)).lines).toEqual(['Flows of the Ribble', 'x', 'a\tb']);
  });

  test('no more rows are written than are asked for', async () => {
    const rows = Array.from({ length: 50 }, (_, at) => rowOf(at + 1, [at])).join('');
    expect((await textOf(single(rows), { mostRows: 3 })).lines).toEqual(['0', '1', '2']);
  });

  test.each([
    ['rows out of order', rowOf(2, [1]) + rowOf(1, [2])],
    ['rows beyond the last', rowOf(2_000_000, [1])],
    ['cells out of order', '<row r="1"><c r="B1"><v>1</v></c><c r="A1"><v>1</v></c></row>'],
    ['cells beyond the last', '<row r="1"><c r="ZZZ1"><v>1</v></c></row>'],
  ])('%s are refused', async (_what, rows) => {
    expect((await refusalOf(single(rows))).message).toMatch(
      /flows.xlsx, sheet “Flows”: the rows or cells of the sheet stand out of order/,
    );
  });
});

const flows = [
  rowOf(1, ['date', 'flow m3/s']),
  rowOf(2, ['2001-01-01', 1]),
  rowOf(3, ['2001-01-02', 2]),
  rowOf(4, ['2001-01-03', 3]),
].join('');
const notes = [rowOf(1, ['Made by the hydrometry office']), rowOf(2, ['Ask us'])].join('');

describe('sheets', () => {
  test('the names are listed in order, of other files there are none', async () => {
    const bytes = handMade({
      sheets: [
        { name: 'B', rows: '' },
        { name: 'A &amp; C', rows: '', state: 'hidden' },
      ],
    });
    expect(await withFile(bytes, (path) => workbookSheets(path, 'f'))).toEqual(['B', 'A & C']);
    expect(await withFile('date,flow\n', (path) => workbookSheets(path, 'f'))).toBeNull();
    expect(await withFile(zipSync({ 'a.csv': strToU8('a') }), (path) => workbookSheets(path, 'f'))).toBeNull();
  });

  test('the only sheet that looks like flows is taken', async () => {
    const bytes = handMade({
      sheets: [
        { name: 'Notes', rows: notes },
        { name: 'Data', rows: flows },
        { name: 'Empty', rows: '' },
      ],
    });
    expect((await textOf(bytes)).sheet).toBe('Data');
  });

  test('hidden sheets are taken only when named', async () => {
    const bytes = handMade({
      sheets: [
        { name: 'Old', rows: flows, state: 'hidden' },
        { name: 'New', rows: flows },
      ],
    });
    expect((await textOf(bytes)).sheet).toBe('New');
    expect((await textOf(bytes, { sheet: 'old' })).sheet).toBe('Old');
  });

  test('of several that may be meant, and of none, one is asked for', async () => {
    const two = handMade({
      sheets: [
        { name: '0306', rows: flows },
        { name: '0401', rows: flows },
        { name: 'Old', rows: flows, state: 'hidden' },
      ],
    });
    expect((await refusalOf(two)).problem).toMatchObject({
      needs: 'sheet',
      message: '2 sheets of the workbook may be meant',
      remedy: 'Say which sheet is to be read: “0306”, “0401”, “Old” (hidden)',
    });
    const none = handMade({
      sheets: [
        { name: 'Notes', rows: notes },
        { name: 'More', rows: notes },
      ],
    });
    expect((await refusalOf(none)).problem.needs).toBe('sheet');
    expect((await refusalOf(two, { sheet: 'Flow' })).problem).toMatchObject({ needs: 'sheet', value: 'Flow' });
  });
});

test('a workbook by an independent writer is read as flows, dates by their format', async () => {
  const values = [12.3, 0, 0.1 + 0.2, null, 1e-7];
  const bytes = await writeXlsxFile([
    [{ value: 'Gauge 0306, daily mean flow' }],
    [{ value: 'Date' }, { value: 'Flow (m3/s)' }, { value: 'Flag' }],
    ...values.map((value, at) => [
      { value: new Date(Date.UTC(2001, 1, 26 + at)), type: Date, format: 'dd/mm/yyyy' },
      value === null ? null : { value, type: Number },
      at === 1 ? { value: 'E' } : null,
    ]),
  ]).toBuffer();
  const { parts, report } = await read(bytes, { fileName: '0306.xlsx' });
  expect(report).toMatchObject({ unit: 'm3/s', accepted: 5, rejectedTotal: 0 });
  expect(daysOf(parts[0])).toEqual({
    '2001-02-26': [12.3, ''],
    '2001-02-27': [0, 'E'],
    '2001-02-28': [0.30000000000000004, ''],
    '2001-03-01': [Number.NaN, ''],
    '2001-03-02': [1e-7, ''],
  });
});

test('a formula without a stored value is a rejected row with its number and reason', async () => {
  const rows = `${flows}<row r="5"><c r="A5" t="inlineStr"><is><t>2001-01-04</t></is></c><c r="B5"><f>B4*2</f></c></row>`;
  const { report, rejected } = await read(single(rows), { fileName: '0306.xlsx' });
  expect(report).toMatchObject({ rows: 4, accepted: 3, rejectedTotal: 1 });
  expect(rejected[0]).toMatchObject({ row: 5, reason: '“formula without a stored value” is not a flow' });
});

test.each([
  [
    'an old workbook',
    Uint8Array.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1, 0, 0]),
    /an old workbook \(\.xls\)/,
  ],
  ['a binary workbook', zipSync({ 'xl/workbook.bin': strToU8('x') }), /a binary workbook \(\.xlsb\)/],
  [
    'an OpenDocument sheet',
    zipSync({ 'content.xml': strToU8('<a/>'), 'META-INF/manifest.xml': strToU8('<a/>') }),
    /an OpenDocument file/,
  ],
  ['a damaged archive', single(flows).slice(0, -30), /the archive cannot be read/],
  ['a sheet with an XML bomb', single(`<!DOCTYPE a [<!ENTITY b "c">]>${flows}`), /not well-formed XML|DOCTYPE/],
])('%s is refused by name', async (_what, bytes, message) => {
  expect((await refusalOf(bytes)).message).toMatch(message);
});

test('a sheet that unpacks to more than a thousand times its size is refused', async () => {
  // 101 MB of blanks between two rows.
  const sheet = `${rowOf(1, ['date', 'flow'])}${' '.repeat(101e6)}${rowOf(2, ['2001-01-01', 1])}`;
  const problem = await refusalOf(single(sheet));
  expect(problem.message).toMatch(/unpacks to more than 1000 times its size|longer than 1024 kB/);
}, 30_000);
