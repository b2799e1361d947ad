import { expect, test } from 'vitest';
import { findFixedSlices } from '../../../../lib/intake/recognise/fixed-slices.ts';
import { detectDelimiter, sampleLines } from '../../../../lib/intake/recognise/sample.ts';

const LF = 10;
const lines = (text: string, wholeFile = true) => sampleLines(new TextEncoder().encode(text), LF, wholeFile);

test('sampleLines numbers lines as the file has them, leaves blank ones out, and trusts an open last line only at the end', () => {
  expect(lines('\uFEFFa\n\n b\r\nc').map(({ line, text }) => [line, text])).toEqual([
    [1, 'a'],
    [3, ' b'],
    [4, 'c'],
  ]);
  expect(lines('a\nb\nc', false).map(({ text }) => text)).toEqual(['a', 'b']);
});

test.each([
  ['a,b\n1,2\n', ','],
  ['a;b\n1,5;2,5\n', ';'],
  ['a\tb\n1,5\t2;5\n', '\t'],
  ['Title, with a comma\nNo delimiter\na;b;c\n1;2;3\n4;5;6\n', ';'],
  ['"x, y";b\n"z, w";2\n', ';'],
  ['a b c\n1 2 3\n', null],
  ['word\n', null],
])('detectDelimiter of %j is %j', (text, delimiter) => {
  expect(detectDelimiter(lines(text), LF)).toBe(delimiter);
});

test('findFixedSlices finds date and numbers at fixed characters, side by side and one apart', () => {
  expect(
    findFixedSlices(lines('194812 1    0.00   -1.50\n1948 1 2    1.25   12.00\n194912 3    0.00    1.00\n')),
  ).toEqual({
    date: [
      [0, 4],
      [4, 6],
      [6, 8],
    ],
    values: [
      [8, 16],
      [16, 24],
    ],
  });
  expect(findFixedSlices(lines('X1 1948 12 01  5.0\nX1 1948 12 02 15.0\nX1 1948 12 03  5.0\n'))).toEqual({
    date: [
      [3, 7],
      [8, 10],
      [11, 13],
    ],
    values: [[13, 18]],
  });
  expect(findFixedSlices(lines('hello world\nand so on\n'))).toBeNull();
});
