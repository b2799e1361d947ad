import { expect, test } from 'vitest';
import { UCUM, unitOfCode } from '../../../../lib/intake/documents/unit-code.ts';
import { UNITS } from '../../../../lib/series/quantities.ts';

test('unitOfCode reads the code that is written for each unit', () => {
  expect(UNITS.map((unit) => unitOfCode(UCUM[unit]))).toEqual([...UNITS]);
});

// UCUM 2.1: `[cft_i]` is the cubic foot, `dm3` the litre; addresses as in OGC 10-126r4, 9.5.
test.each([
  ['[ft_i]3/s', 'ft3/s'],
  ['dm3/s', 'L/s'],
  ['http://unitsofmeasure.org/ucum.html#m3/s', 'm3/s'],
  ['m3.s-1', 'm3/s'],
  ['%5Bcft_i%5D/s', 'ft3/s'],
] as const)('unitOfCode takes %s for %s', (text, unit) => {
  expect(unitOfCode(text)).toBe(unit);
});

test.each(['constructor', 'toString', '__proto__', 'hasOwnProperty', 'valueOf', '', '%', 'furlong/fortnight'])(
  'unitOfCode knows no unit “%s”',
  (text) => {
    expect(unitOfCode(text)).toBeNull();
  },
);
