import { expect, test } from 'vitest';
import { flagBits } from '../../../lib/intake/flags.ts';
import { FLAG } from '../../../lib/series/daily-series.ts';

test.each([
  ['A', 0],
  ['', 0],
  ['M', 0],
  ['A:e', FLAG.estimated],
  ['e', FLAG.estimated],
  ['E', FLAG.estimated],
  ['Estimated', FLAG.estimated],
  ['P', FLAG.provisional],
  ['P:e', FLAG.provisional | FLAG.estimated],
  ['p e', FLAG.provisional | FLAG.estimated],
  ['P,Ice', FLAG.provisional | FLAG.ice],
  ['Ice', FLAG.ice],
  ['<', FLAG['below-detection']],
  ['suspect', FLAG.suspect],
  // Letters inside other words say nothing.
  ['Approved', 0],
  ['Rice', 0],
  ['constructor', 0],
])('flagBits(“%s”) is %i', (text, bits) => {
  expect(flagBits(text)).toBe(bits);
});

test('flagBits takes a further letter for ice only where the file’s symbols have it', () => {
  expect(flagBits('B')).toBe(0);
  expect(flagBits('B', 'b')).toBe(FLAG.ice);
});
