import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { annualStep } from '../../../lib/checks/annual-step.ts';
import { seriesOf, withGap } from '../series-of.ts';
import { inventedRecord } from './invented-record.ts';

/** Ten years of 2 and ten of 1, with a little of their own in every year. */
function stepped(years = 20) {
  const first = dayNumber(1991, 1, 1);
  const days = dayNumber(1991 + years, 1, 1) - first;
  return seriesOf([1991, 1, 1], {
    days,
    flow: (i) => {
      const year = Number(isoDate(first + i).slice(0, 4));
      return (year < 2001 ? 2 : 1) + ((year * 7) % 10) / 1000;
    },
  });
}

test('annualStep names the first day of the later part, with the figures of both', () => {
  const [step, ...more] = annualStep(stepped());
  expect(more).toEqual([]);
  expect(isoDate(step.firstDay)).toBe('2001-01-01');
  expect(step).toMatchObject({ kind: 'step', lastDay: step.firstDay, days: 0 });
  // K of two parts of ten, all of one above all of the other: 10 × 10; p = 2·exp(−6·10⁴/(20³ + 20²))
  expect(step.detail).toMatchObject({ k: 100, yearsBefore: 10, yearsAfter: 10 });
  expect(step.detail.p).toBeCloseTo(2 * Math.exp(-60000 / 8400), 12);
  expect(step.detail.meanBefore).toBeCloseTo(2.0045, 3);
  expect(step.detail.meanAfter).toBeCloseTo(1.0045, 3);
});

test('a year with more than 18 days missing does not count: below, at and above', () => {
  const year = (missing: number) => {
    const first = dayNumber(1995, 1, 1) - dayNumber(1991, 1, 1);
    return annualStep(withGap(stepped(), first + 50, first + 49 + missing))[0].detail.yearsBefore;
  };
  expect([year(17), year(18), year(19)]).toEqual([10, 10, 9]);
});

test('too few years tell no step at the 1 % level, and a level record has none', () => {
  expect(annualStep(stepped(12))).toEqual([]);
  expect(annualStep(inventedRecord(3))).toEqual([]);
  expect(annualStep(seriesOf([1991, 1, 1], []))).toEqual([]);
});
