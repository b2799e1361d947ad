import { expect, test } from 'vitest';
import { numberSigns } from '../../../../lib/intake/recognise/number-signs.ts';
import { signsOf } from '../../../../lib/intake/recognise/recognised-mapping.ts';

test.each([
  [['1.5', '2', '1234'], { decimal: '.' }],
  [['1,5', '2'], { decimal: ',' }],
  [['0,125', '1,234'], { decimal: ',' }],
  [['1234,567'], { decimal: ',' }],
  [['1,234', '1234'], { decimal: ',' }],
  [['1,234.5', '2'], { decimal: '.', thousands: ',' }],
  [['1,234,567'], { decimal: '.', thousands: ',' }],
  [['1,234', '12.5'], { decimal: '.', thousands: ',' }],
  [['1.234,5', '2'], { decimal: ',', thousands: '.' }],
  [['1.234.567'], { decimal: ',', thousands: '.' }],
  [['1.234', '12,5'], { decimal: ',', thousands: '.' }],
  [['1 234', '12'], { decimal: '.', thousands: ' ' }],
  [['1\u00a0234,5', '12'], { decimal: ',', thousands: ' ' }],
  [["1'234.5"], { decimal: '.', thousands: "'" }],
  [['1’234,5'], { decimal: ',', thousands: "'" }],
  [['-1,234', '<0,5'], { decimal: ',' }],
  // A missing code has four digits and no sign between them, yet is no number of the file.
  [['-9999', '1,234'], null],
  [['1,234', '999', '12'], null],
  [['1.234', '999'], { decimal: '.' }],
  [['1.234', '2.345', '3.456', '4.567', '5.678', '1', '2', '3', '4', '5'], null],
  [['1.234', '2.345', '3.456', '4.567', '0.678', '1', '2', '3', '4', '5'], { decimal: '.' }],
  [['2,5', '1.5'], { decimal: '.' }],
  [[], { decimal: '.' }],
])('numberSigns(%j) is %j', (texts, signs) => {
  expect(numberSigns(texts)).toEqual(signs);
});

test.each([
  [{ decimal: ',' } as const, { decimal: ',' }],
  [{ decimal: '.' } as const, { decimal: '.', thousands: ',' }],
  [{ thousands: ',' } as const, { decimal: '.', thousands: ',' }],
  [{ thousands: ' ' } as const, { decimal: '.', thousands: ' ' }],
])('signsOf “1,234” with %j given leaves nothing open: %j', (given, signs) => {
  expect(signsOf(['1,234', '999'], given)).toEqual({ signs, open: null });
});

test('signsOf names a value whose sign may be either', () => {
  expect(signsOf(['999', '1,234'], {}).open).toBe('1,234');
});
