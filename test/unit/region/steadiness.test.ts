import fc from 'fast-check';
import { expect, test } from 'vitest';
import { steadinessOf } from '../../../lib/region/steadiness.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';

const from = (first: number, n: number): number[] => Array.from({ length: n }, (_, i) => first + i);

test('steadinessOf: a straight line agrees in all of its windows: of 17 years there are 6 of at least 15', () => {
  expect(steadinessOf({ years: from(1980, 17), values: from(1, 17) }, null)).toEqual({ windows: 6, share: 1 });
});

test('steadinessOf: counts every start and end year of the period, by the definition taken literally', () => {
  const years = fc.uniqueArray(fc.integer({ min: 1980, max: 2006 }), { minLength: 15, maxLength: 24 });
  fc.assert(
    fc.property(years, fc.infiniteStream(fc.integer({ min: 0, max: 9 })), (unordered, stream) => {
      const usable = unordered.toSorted((a, b) => a - b);
      const values = usable.map(() => stream.next().value as number);
      const whole = Math.sign(mannKendall(values).s);
      let [windows, agreeing] = [0, 0];
      for (let start = 1978; start <= 2008; start++) {
        for (let end = start; end <= 2008; end++) {
          const inside = values.filter((_, i) => usable[i] >= start && usable[i] <= end);
          if (inside.length < 15) continue;
          windows++;
          if (Math.sign(mannKendall(inside).s) === whole) agreeing++;
        }
      }
      const found = steadinessOf({ years: usable, values }, [1978, 2008]);
      expect(found).toEqual({ windows, share: whole === 0 ? null : agreeing / windows });
    }),
    { numRuns: 25 },
  );
});

test.each([
  ['14 years', from(1, 14), { windows: 0, share: null }],
  ['two values', [1, 2], { windows: 0, share: null }],
  ['no value', [], { windows: 0, share: null }],
  ['15 equal values', new Array<number>(15).fill(3), { windows: 1, share: null }],
  ['15 zeros', new Array<number>(15).fill(0), { windows: 1, share: null }],
])('steadinessOf: %s', (_, values, expected) => {
  expect(steadinessOf({ years: from(1990, values.length), values }, null)).toEqual(expected);
});

test('steadinessOf: refuses lists of unlike length and values that are no numbers', () => {
  expect(() => steadinessOf({ years: [1990], values: [1, 2] }, null)).toThrow('steadinessOf: years and values');
  const values = [...from(1, 14), Number.POSITIVE_INFINITY];
  expect(() => steadinessOf({ years: from(1990, 15), values }, null)).toThrow('windowScores: x[14]');
});
