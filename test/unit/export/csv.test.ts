import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { type Column, csvTable, numberText } from '../../../lib/export/csv.ts';

test('numberText keeps ten significant digits and drops binary tails', () => {
  expect(numberText(0.1 + 0.2)).toBe('0.3');
  expect(numberText(1 / 3)).toBe('0.3333333333');
  expect(numberText(-12345.678901234)).toBe('-12345.6789');
  expect(numberText(1e-9 / 3)).toBe('3.333333333e-10');
});

test('numberText writes whole numbers whole, and minus nought as 0', () => {
  expect(numberText(12345678901)).toBe('12345678901');
  expect(numberText(-0)).toBe('0');
  expect(numberText(1985)).toBe('1985');
});

test('numberText leaves a missing number empty', () => {
  expect([numberText(null), numberText(Number.NaN), numberText(Number.POSITIVE_INFINITY)]).toEqual(['', '', '']);
});

test('numberText is within half a unit of the tenth digit of any number', () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 }), (value) => {
      const back = Number(numberText(value));
      expect(Math.abs(back - value)).toBeLessThanOrEqual(5.0001e-10 * Math.abs(value));
    }),
  );
});

const columns: Column<{ text: string; number: number | null }>[] = [
  { name: 'text', description: '', datatype: 'string', value: (row) => row.text },
  { name: 'number', description: '', datatype: 'number', value: (row) => row.number },
];

test('csvTable writes a header, CR LF after every row, and quotes only what needs it', () => {
  const text = csvTable(columns, [
    { text: 'plain', number: 1.5 },
    { text: 'a,b', number: null },
    { text: 'say "low"', number: 0 },
    { text: 'two\nlines', number: -2 },
  ]);
  expect(text).toBe('text,number\r\nplain,1.5\r\n"a,b",\r\n"say ""low""",0\r\n"two\nlines",-2\r\n');
});

test('csvTable keeps text that looks like a formula letter for letter', () => {
  expect(csvTable(columns, [{ text: '=1+1', number: null }])).toBe('text,number\r\n=1+1,\r\n');
});

test('any text comes back through an independent CSV reader as it went in', () => {
  fc.assert(
    fc.property(fc.array(fc.string({ unit: 'grapheme' })), (texts) => {
      const csv = csvTable(
        columns,
        texts.map((text) => ({ text, number: 7 })),
      );
      const back: string[][] = parse(csv, { record_delimiter: '\r\n' });
      expect(back.slice(1).map(([text]) => text)).toEqual(texts);
    }),
  );
});
