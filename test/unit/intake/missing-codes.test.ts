import { expect, test } from 'vitest';
import { isMissingText } from '../../../lib/intake/missing-codes.ts';

test.each([
  '',
  'NA',
  'n/a',
  'NaN',
  '-',
  '--',
  '-99',
  '-999',
  '-999.00',
  '-9999',
  '-99.0000',
  '-99.99',
  '-999,0',
  'Ice',
  'Eqp',
  'M',
  'Lücke',
])('isMissingText(“%s”): no value', (text) => {
  expect(isMissingText(text)).toBe(true);
});

test.each(['0', '-9', '-9.9', '-98', '-990', '-999.5', '999', '1.5', 'abc', 'A', '<0.5', '-1'])(
  'isMissingText(“%s”) is false: a value, or text that must be rejected',
  (text) => {
    expect(isMissingText(text)).toBe(false);
  },
);
