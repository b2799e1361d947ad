import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { databasePath } from '../../../lib/store/database-url.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { databaseContent } from './database-content.ts';
import { type Content, importOne, refusalOf, registeredRegion } from './registered-region.ts';

/** Documents and archives that were made to do harm, or are damaged: each refused, and nothing of it stored. */
const place = registeredRegion();

const CSV = 'station,date,discharge_m3s\nA1,2001-01-01,1\nA1,2001-01-02,2\n';
const GOOD = collection({ station: 'A1', points: daily(['1', '2', '3']) });
const TABLE = [
  ['station', 'date', 'flow m3/s'],
  ['A1', '2001-01-01', 1],
  ['A1', '2001-01-02', 2],
];
const WORKBOOK = handMade({ sheets: [{ name: 'Flows', rows: TABLE.map((row, at) => rowOf(at + 1, row)).join('') }] });
const declared = (doctype: string) => GOOD.replace('?>\n', `?>\n${doctype}\n`).replace('>1<', '>&x;<');

/** Ten entities, each ten times the one before: a thousand million letters. */
const LAUGHS = `<!DOCTYPE c [<!ENTITY l0 "1">${Array.from(
  { length: 9 },
  (_, at) => `<!ENTITY l${at + 1} "${`&l${at};`.repeat(10)}">`,
).join('')}<!ENTITY x "&l9;">]>`;

/** A workbook with a part changed. */
function changed(part: string, change: (text: string) => string): Uint8Array {
  const parts = unzipSync(WORKBOOK);
  return zipSync({ ...parts, [part]: strToU8(change(strFromU8(parts[part]))) });
}
/** An archive whose one file is named otherwise: both names have as many letters. */
function renamed(to: string): Uint8Array {
  const from = 'a'.repeat(to.length);
  const bytes = Buffer.from(zipSync({ [from]: strToU8(CSV) })).toString('latin1');
  return Uint8Array.from(Buffer.from(bytes.replaceAll(from, to), 'latin1'));
}
const zeros = () => new Uint8Array(101e6);
const cut = (bytes: Uint8Array) => bytes.slice(0, bytes.length - 40);

const CASES: [what: string, file: string, content: () => Content, says: RegExp, value: string | undefined][] = [
  ['an XML bomb', 'bomb.xml', () => declared(LAUGHS), /declares entities of its own.*never expanded/, undefined],
  [
    'a grammar from elsewhere',
    'grammar.xml',
    () => declared('<!DOCTYPE c SYSTEM "http://127.0.0.1:9/x.dtd">'),
    /has a DOCTYPE/,
    undefined,
  ],
  ['a document that is cut short', 'cut.xml', () => GOOD.slice(0, -60), /the document is cut short/, undefined],
  ['a zip bomb', 'bomb.zip', () => zipSync({ 'a.csv': zeros() }), /unpacks to more than 1000 times/, '101 MB from'],
  ['a gzip bomb', 'bomb.csv.gz', () => gzipSync(zeros()), /unpacks to more than 1000 times/, '100 MB from'],
  [
    'a bomb within an archive',
    'nested.zip',
    () => zipSync({ 'a.csv.gz': gzipSync(zeros(), { level: 1 }) }),
    /unpacks to more than 1000 times/,
    '100 MB from',
  ],
  [
    'a workbook that is a bomb',
    'bomb.xlsx',
    () => changed('xl/worksheets/sheet1.xml', (text) => text.replace('<sheetData>', `<sheetData>${' '.repeat(101e6)}`)),
    /unpacks to more than 1000 times/,
    '101 MB from',
  ],
  ['a path that climbs out', 'set.zip', () => renamed('../../flows.csv'), /a file outside itself/, '../../flows.csv'],
  ['a path that climbs out of a folder', 'set.zip', () => renamed('a/../../b.csv'), /outside itself/, 'a/../../b.csv'],
  ['an absolute path', 'set.zip', () => renamed('/etc/flows.csv'), /a file outside itself/, '/etc/flows.csv'],
  [
    'an archive that is cut short',
    'cut.zip',
    () => cut(zipSync({ 'a.csv': strToU8(CSV) })),
    /cannot be read/,
    undefined,
  ],
  ['a packed file that is cut short', 'cut.csv.gz', () => cut(gzipSync(CSV)), /cannot be unpacked/, undefined],
  ['a workbook that is cut short', 'cut.xlsx', () => cut(WORKBOOK), /cannot be read/, undefined],
  ['an archive without files', 'none.zip', () => zipSync({}), /holds no file that could be imported/, undefined],
];

test.each(CASES)('%s is refused by its name, and nothing of it is kept', async (_what, file, content, says, value) => {
  const { message } = await refusalOf(place, file, content());
  expect(message).toMatch(says);
  if (value !== undefined) expect(message).toContain(value);
});

describe('an external entity is never read', () => {
  const SECRET = 'word-of-a-file-beside';
  const entity = () => {
    const path = join(place.folder, 'secret.txt');
    writeFileSync(path, SECRET);
    return `<!DOCTYPE c [<!ENTITY x SYSTEM "file://${path}">]>`;
  };
  test.each<[string, () => Content]>([
    ['a document', () => declared(entity())],
    ['a sheet', () => changed('xl/worksheets/sheet1.xml', (text) => entity() + text.replace('A1</t>', '&x;</t>'))],
    ['the list of sheets', () => changed('xl/workbook.xml', (text) => entity() + text.replace('"Flows"', '"&x;"'))],
  ])('in %s', async (_what, content) => {
    const before = databaseContent(databasePath());
    const outcome = await importOne(place, 'entity.file', content());
    expect(outcome.taken).toEqual([]);
    expect(outcome.problems.map(({ file }) => file)).toEqual(['entity.file']);
    expect(outcome.problems[0].message).toMatch(/^entity\.file.*declares entities of its own.*never expanded/);
    expect(JSON.stringify(outcome)).not.toContain(SECRET);
    expect(databaseContent(databasePath()) === before).toBe(true);
  });
});
