import { expect, test } from 'vitest';
import { tooManyZeros, yearsNeeded } from '../../../lib/region/completeness.ts';
import { standingOf } from '../../../lib/region/eligibility.ts';
import { usedYears } from '../../../lib/region/used-years.ts';
import { annualMinima, constant } from './region-fixtures.ts';

const rule = { minYears: 20, minCoverage: 0.8 };
const period: [number, number] = [1981, 2020];
const none = Number.NaN;

const standing = (values: number[], over: [number, number] | null = period, first = 1981) =>
  standingOf(usedYears(annualMinima({ first, values }), over), over, rule);

test('standingOf ranks a full record', () => {
  expect(standing(constant(40))).toEqual({ kind: 'ranked' });
});

test('standingOf judges coverage at its boundary: 32 of 40 years will do, 31 will not', () => {
  expect(standing([...constant(16), ...constant(8, none), ...constant(16)])).toEqual({ kind: 'ranked' });
  expect(standing([...constant(16), ...constant(9, none), ...constant(15)])).toEqual({
    kind: 'unranked',
    reason: '31 of the 40 years 1981–2020 usable, 32 needed (80 %)',
  });
});

test('standingOf judges the first and the last ten years by themselves', () => {
  expect(standing([...constant(2, none), ...constant(38)])).toEqual({ kind: 'ranked' });
  expect(standing([...constant(3, none), ...constant(37)])).toEqual({
    kind: 'unranked',
    reason: '7 of the first ten years 1981–1990 usable, 8 needed (80 %)',
  });
  expect(standing([...constant(38), ...constant(2, none)])).toEqual({ kind: 'ranked' });
  expect(standing([...constant(37), ...constant(3, none)])).toEqual({
    kind: 'unranked',
    reason: '7 of the last ten years 2011–2020 usable, 8 needed (80 %)',
  });
});

test('standingOf judges the number of usable years at its boundary', () => {
  expect(standing(constant(20), [1981, 2000])).toEqual({ kind: 'ranked' });
  expect(standing([...constant(10), none, ...constant(9)], [1981, 2000])).toEqual({
    kind: 'unranked',
    reason: '19 usable years, 20 needed',
  });
});

test('standingOf names every rule that failed', () => {
  expect(standing([...constant(25, none), ...constant(15, 0)])).toEqual({
    kind: 'unranked',
    reason:
      '15 usable years, 20 needed; 15 of the 40 years 1981–2020 usable, 32 needed (80 %); ' +
      '0 of the first ten years 1981–1990 usable, 8 needed (80 %); 15 of 15 minima are zero, a third or more',
  });
});

test('standingOf puts a third or more zero minima under Drying: 13 of 40 is less, 14 is not', () => {
  expect(standing([...constant(27), ...constant(13, 0)])).toEqual({ kind: 'ranked' });
  expect(standing([...constant(26), ...constant(14, 0)])).toEqual({
    kind: 'drying',
    reason: '14 of 40 minima are zero, a third or more: listed under Drying, by zero-flow days',
  });
});

test('standingOf without a period judges a station over its own years, from the first usable to the last', () => {
  const own = [none, none, ...constant(25), none];
  expect(standing(own, null)).toEqual({ kind: 'ranked' });
  expect(standing([...constant(12), ...constant(10, none), ...constant(12)], null)).toEqual({
    kind: 'unranked',
    reason: '24 of the 34 years 1981–2014 usable, 28 needed (80 %)',
  });
});

test('standingOf says when there is no usable year at all', () => {
  expect(standing(constant(40, none))).toEqual({ kind: 'unranked', reason: 'no usable year in 1981–2020' });
  expect(standing([], null)).toEqual({ kind: 'unranked', reason: 'no usable year' });
  expect(standing(constant(5), period, 2021)).toEqual({ kind: 'unranked', reason: 'no usable year in 1981–2020' });
});

test('usedYears takes the usable years of the period, both ends included, with their figures', () => {
  const annual = annualMinima({ first: 2000, values: [1, none, 0, 4, 5], zeroDays: [0, 9, 30, 0, 1] });
  const used = usedYears(annual, [2000, 2003]);
  expect(used).toMatchObject({ years: [2000, 2002, 2003], minima: [1, 0, 4], zeroDays: [0, 30, 0], zeroMinima: 1 });
  expect(used.days).toEqual([annual.day[0], annual.day[2], annual.day[3]]);
  expect(usedYears(annual, null).years).toEqual([2000, 2002, 2003, 2004]);
});

test('yearsNeeded compares as real numbers, free of binary tails', () => {
  expect(yearsNeeded(0.8, 38)).toBe(31);
  expect(yearsNeeded(0.8, 40)).toBe(32);
  expect(yearsNeeded(0.55, 20)).toBe(11);
  expect(yearsNeeded(0, 40)).toBe(0);
  expect(yearsNeeded(1, 40)).toBe(40);
});

test('tooManyZeros is from a third on, and never of no years', () => {
  expect([2, 3, 4].map((zeros) => tooManyZeros(zeros, 9))).toEqual([false, true, true]);
  expect(tooManyZeros(0, 0)).toBe(false);
});
