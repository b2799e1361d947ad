import { expect, test } from 'vitest';
import { parseDecimal } from '../../../lib/intake/numbers.ts';

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
