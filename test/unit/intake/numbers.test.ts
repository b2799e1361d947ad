import { expect, test } from 'vitest';
import { parseDecimal, parseGrouped } from '../../../lib/intake/numbers.ts';

const POINT = 46;
const COMMA = 44;

function parse(text: string, decimal = POINT): number {
  const bytes = new TextEncoder().encode(`x${text}x`);
  return parseDecimal(bytes, 1, bytes.length - 1, decimal);
}

test.each([
  ...['0', '7', '87.0', '0.0099109', '12345.678', '.5', '5.', '+3.2', '-3.2', '-0.0', '007.10', '1e3', '2.5E-3'],
  // 15, 16 and 17 significant digits; 22 and 23 decimals; halves between two doubles.
  ...['123456789012345', '1234567890123456', '0.12345678901234567', '9007199254740993', '0.1000000000000000055511'],
  ...[
    '0.0000000000000000000001',
    '0.00000000000000000000012',
    '123456789.123456789',
    '1e-310',
    '1.7976931348623157e308',
  ],
])('parseDecimal(%s) gives exactly the double of Number(text)', (text) => {
  expect(parse(text)).toBe(Number(text));
});

test.each([
  '',
  '.',
  '-',
  '+',
  '1.2.3',
  '1,5',
  '0x10',
  'Infinity',
  'NaN',
  '1e999',
  '12a',
  '1 2',
  '--1',
  '1e',
  'e5',
  '½',
])('parseDecimal(“%s”) is NaN: not one finite decimal number', (text) => {
  expect(parse(text)).toBeNaN();
});

test('parseDecimal with a decimal comma reads 2,345 as 2.345, and takes no point', () => {
  expect(parse('2,345', COMMA)).toBe(2.345);
  expect(parse('-0,5', COMMA)).toBe(-0.5);
  expect(parse('1.234,5', COMMA)).toBeNaN();
  expect(parse('1.5', COMMA)).toBeNaN();
  expect(parse('1,2345678901234567', COMMA)).toBe(1.2345678901234567);
});

test.each([
  ['1,234.5', '.', ',', 1234.5],
  ['1,234,567', '.', ',', 1234567],
  ['999', '.', ',', 999],
  ['1234.5', '.', ',', 1234.5],
  ['1.234,5', ',', '.', 1234.5],
  ['-1 234,5', ',', ' ', -1234.5],
  ['1\u202f234', '.', ' ', 1234],
  ['1\u00a0234.25', '.', ' ', 1234.25],
  ["12'345.5", '.', "'", 12345.5],
  ['12’345', '.', "'", 12345],
  ['1.5e3', '.', ',', 1500],
] as const)('parseGrouped(“%s”) is a number of groups of three', (text, decimal, thousands, value) => {
  expect(parseGrouped(text, decimal, thousands)).toBe(value);
});

test.each([
  ['1,23', '.', ','],
  ['1234,567', '.', ','],
  ['1,234.567,8', '.', ','],
  [',123', '.', ','],
  ['1,,234', '.', ','],
  ['1.234.5', ',', '.'],
  ['1,2345', '.', ','],
  ['', '.', ','],
] as const)('parseGrouped(“%s”) is NaN', (text, decimal, thousands) => {
  expect(parseGrouped(text, decimal, thousands)).toBeNaN();
});
