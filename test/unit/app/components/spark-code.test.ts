import fc from 'fast-check';
import { expect, test } from 'vitest';
import { decodeRatios, encodeRatios } from '@/app/components/spark-code';

/** Half a step of 2/88. */
const HALF_STEP = 1 / 88;

test('encodeRatios keeps one character a year: gaps as missing, what is above twice the mean as above', () => {
  const decoded = decodeRatios(encodeRatios([1990, 1991, 1994], [0, 5, 21], 10));
  expect(decoded[0]).toBe(0);
  expect(Math.abs(decoded[1] - 0.5)).toBeLessThanOrEqual(HALF_STEP);
  expect([...decoded.slice(2, 4)]).toEqual([Number.NaN, Number.NaN]);
  expect(decoded[4]).toBe(Number.POSITIVE_INFINITY);
});

test('encodeRatios answers no years with nothing, and a mean of 0 with zeros', () => {
  expect(encodeRatios([], [], Number.NaN)).toBe('');
  expect([...decodeRatios(encodeRatios([1990, 1991], [0, 0], 0))]).toEqual([0, 0]);
});

test('encodeRatios writes no quote and no backslash, which JSON would double', () => {
  const minima = Array.from({ length: 401 }, (_, i) => i / 200);
  const years = minima.map((_, i) => 1600 + i);
  expect(encodeRatios(years, minima, 1)).not.toMatch(/["\\]/);
});

test('decodeRatios(encodeRatios(x)) is x to half a step, up to twice the mean', () => {
  fc.assert(
    fc.property(fc.array(fc.double({ min: 0, max: 2, noNaN: true }), { minLength: 1, maxLength: 90 }), (ratios) => {
      const years = ratios.map((_, i) => 1930 + i);
      const decoded = decodeRatios(encodeRatios(years, ratios, 1));
      return ratios.every((ratio, i) => Math.abs(decoded[i] - ratio) <= HALF_STEP + 1e-12);
    }),
  );
});
