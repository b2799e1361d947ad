import { expect, test } from 'vitest';
import { parseIsoDate } from '../../../lib/calendar/day.ts';
import { dateAngle, datesOnALine } from '../../../lib/lowflow/minimum-dates.ts';
import { circularMean, unrolled } from '../../../lib/statistics/circular.ts';

const lineOf = (...dates: string[]) => datesOnALine(dates.map(parseIsoDate));

test('dateAngle is day of the year over its own length: 31 December is a full turn in every year', () => {
  expect(dateAngle(parseIsoDate('2001-12-31'))).toBeCloseTo(2 * Math.PI, 12);
  expect(dateAngle(parseIsoDate('2004-12-31'))).toBeCloseTo(2 * Math.PI, 12);
  expect(dateAngle(parseIsoDate('2004-02-29'))).toBeCloseTo((2 * Math.PI * 60) / 366, 12);
});

test('datesOnALine keeps dates on both sides of New Year beside one another', () => {
  const { values, concentration } = lineOf('2001-12-30', '2003-01-02', '2003-12-28', '2005-01-04');
  expect(Math.max(...values) - Math.min(...values)).toBeCloseTo(7, 1);
  expect(values[1] - values[0]).toBeCloseTo(3, 1);
  expect(concentration).toBeGreaterThan(0.99);
});

test('datesOnALine lies within half a year of the mean date', () => {
  const { values, meanDay } = lineOf('2001-09-01', '2002-09-10', '2003-08-20', '2005-03-05');
  for (const value of values) expect(Math.abs(value - meanDay)).toBeLessThanOrEqual(182.5);
  expect(values[0]).toBeCloseTo(244, 9);
});

test('datesOnALine of none is empty, of opposite dates told about the middle of the year', () => {
  expect(lineOf()).toEqual({ values: [], meanDay: Number.NaN, concentration: Number.NaN });
  const opposite = lineOf('2001-07-02', '2001-12-31', '2002-07-02', '2002-12-31');
  expect(opposite.concentration).toBeLessThan(0.01);
  for (const value of opposite.values) expect(value).toBeGreaterThanOrEqual(0);
});

test('circularMean refuses what is no angle, and has no direction without angles', () => {
  expect(() => circularMean([1, Number.NaN])).toThrow('circularMean: angles[1] must be finite, got NaN');
  expect(() => circularMean([Number.POSITIVE_INFINITY])).toThrow(RangeError);
  expect(circularMean([])).toEqual({ angle: Number.NaN, concentration: Number.NaN });
});

test('unrolled comes to at most half a turn from where it is asked for', () => {
  const turn = 2 * Math.PI;
  expect(unrolled(0.1, turn - 0.1)).toBeCloseTo(turn + 0.1, 12);
  expect(unrolled(turn - 0.1, 0.1)).toBeCloseTo(-0.1, 12);
  expect(unrolled(5 * turn + 1, 1)).toBeCloseTo(1, 10);
});
