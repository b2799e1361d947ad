import { expect, test } from 'vitest';
import { DelimitedLines } from '../../../../lib/intake/rows/delimited.ts';
import { Fields, type LineSplitter } from '../../../../lib/intake/rows/fields.ts';
import { FixedWidthLines } from '../../../../lib/intake/rows/fixed-width.ts';
import { WhitespaceLines } from '../../../../lib/intake/rows/whitespace.ts';

const LF = 10;

function split(splitter: LineSplitter, text: string): string[][] {
  const bytes = new TextEncoder().encode(text);
  const fields = new Fields(2);
  const lines: string[][] = [];
  for (let at = 0; at < bytes.length; ) {
    at = splitter.split(bytes, at, bytes.length, fields);
    const line: string[] = [];
    for (let field = 0; field < fields.count; field++) {
      line.push(new TextDecoder().decode(bytes.subarray(fields.start[field], fields.end[field])));
    }
    lines.push(fields.unclosed ? ['UNCLOSED', ...line] : line);
  }
  return lines;
}

const comma = new DelimitedLines(44, LF);

test.each([
  ['plain fields', 'a,b,c\n', [['a', 'b', 'c']]],
  [
    'CRLF, and no end on the last line',
    'a,b\r\nc,d',
    [
      ['a', 'b'],
      ['c', 'd'],
    ],
  ],
  [
    'CRLF behind an empty last field',
    'a,\r\nb,\r\n',
    [
      ['a', ''],
      ['b', ''],
    ],
  ],
  ['blanks around fields', ' a , b ,c \n', [['a', 'b', 'c']]],
  ['quoted fields with delimiters', '"x, y",1,"z"\n', [['x, y', '1', 'z']]],
  ['doubled quotes stay for the reader of the text', '"a ""b""",2\n', [['a ""b""', '2']]],
  ['empty quoted field', '"",5\r\n', [['', '5']]],
  ['more fields than there was room for', 'a,b,c,d,e,f,g\n', [['a', 'b', 'c', 'd', 'e', 'f', 'g']]],
  ['blank line', '\nx,y\n', [[''], ['x', 'y']]],
  [
    'a quote that is not closed',
    '"a,b\nc,d\n',
    [
      ['UNCLOSED', 'a,b'],
      ['c', 'd'],
    ],
  ],
  ['text behind a closing quote', '"a"b,c\n', [['UNCLOSED', 'a', 'c']]],
])('DelimitedLines: %s', (_, text, lines) => {
  expect(split(comma, text)).toEqual(lines);
});

test('DelimitedLines with semicolons and tabs leaves commas in their fields', () => {
  expect(split(new DelimitedLines(59, LF), '1,5;2,5\n')).toEqual([['1,5', '2,5']]);
  expect(split(new DelimitedLines(9, LF), '1,5\t\t2;5\n')).toEqual([['1,5', '', '2;5']]);
});

test('DelimitedLines with carriage returns alone as line ends', () => {
  expect(split(new DelimitedLines(44, 13), 'a,b\rc,d')).toEqual([
    ['a', 'b'],
    ['c', 'd'],
  ]);
});

test('WhitespaceLines: runs of blanks and tabs set apart, padding at either end is none', () => {
  expect(split(new WhitespaceLines(LF), '  a  b\tc  \r\n\n d\n')).toEqual([['a', 'b', 'c'], [], ['d']]);
});

test('FixedWidthLines: slices are trimmed; a line that ends before its last slice has a field fewer', () => {
  const splitter = new FixedWidthLines(
    [
      [0, 4],
      [4, 6],
      [6, 8],
      [8, 14],
    ],
    LF,
  );
  expect(split(splitter, '1948 1 1  0.50\r\n194812 3  1\n')).toEqual([
    ['1948', '1', '1', '0.50'],
    ['1948', '12', '3'],
  ]);
});
