import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { annualMinima, type MinimaOptions } from '../../../lib/lowflow/annual-minima.ts';
import { seriesOf, withFlag, withGap } from '../series-of.ts';

const OPTIONS: MinimaOptions = { yearStart: 1, season: null, days: 7, maxMissingDays: 18, exclude: ['provisional'] };

/** 2001 to 2004, 10 m³/s but for a trough of 2 m³/s on the ten days from 1 September of each year. */
const TROUGH_STARTS = [243, 608, 973, 1339];
const record = seriesOf([2001, 1, 1], {
  days: 1461,
  flow: (i) => (TROUGH_STARTS.some((start) => i >= start && i < start + 10) ? 2 : 10),
});

test('annualMinima gives each year its smallest 7-day mean and the last day of the first window that attains it', () => {
  const minima = annualMinima(record, OPTIONS);
  expect([...minima.years]).toEqual([2001, 2002, 2003, 2004]);
  expect([...minima.minimum]).toEqual([2, 2, 2, 2]);
  expect(Array.from(minima.day, isoDate)).toEqual(['2001-09-07', '2002-09-07', '2003-09-07', '2004-09-07']);
  expect([...minima.usable]).toEqual([1, 1, 1, 1]);
  expect(minima.reason).toEqual(['', '', '', '']);
  expect([...minima.zeroDays]).toEqual([0, 0, 0, 0]);
  expect(minima.meanFlow[0]).toBeCloseTo((355 * 10 + 10 * 2) / 365, 12);
});

test('annualMinima: windows stay inside the low-flow year', () => {
  // Low over New Year: seven low days, of which four belong to the first year and three to the next.
  const overNewYear = seriesOf([2001, 1, 1], { days: 730, flow: (i) => (i >= 361 && i < 368 ? 0 : 7) });
  const minima = annualMinima(overNewYear, OPTIONS);
  expect([...minima.minimum]).toEqual([3, 4]);
  expect([...annualMinima(overNewYear, { ...OPTIONS, yearStart: 7 }).minimum]).toEqual([7, 0, 7]);
});

test('annualMinima: ties that differ only in binary fractions go to the first window', () => {
  const tied = seriesOf([2001, 1, 1], { days: 365, flow: (i) => (i < 7 ? 0.1 : i < 100 ? 5 : 0.3 - 0.2) });
  const minima = annualMinima(tied, OPTIONS);
  expect(minima.minimum[0]).toBe(0.1);
  expect(isoDate(minima.day[0])).toBe('2001-01-07');
});

test('annualMinima: a dry week after a flood is exactly 0 and its days are counted', () => {
  const dry = seriesOf([2001, 1, 1], { days: 365, flow: (i) => (i >= 200 && i < 210 ? 0 : 1234.5678 + i / 3) });
  const minima = annualMinima(dry, OPTIONS);
  expect(minima.minimum[0]).toBe(0);
  expect(isoDate(minima.day[0])).toBe(isoDate(dayNumber(2001, 1, 1) + 206));
  expect(minima.zeroDays[0]).toBe(10);
});

test('annualMinima lists every year from the first to the last value, incomplete ones as unusable', () => {
  const from = seriesOf([2001, 11, 20], { days: 200, flow: () => 5 });
  const minima = annualMinima(from, OPTIONS);
  expect([...minima.years]).toEqual([2001, 2002]);
  expect([...minima.missingDays]).toEqual([323, 365 - 158]);
  expect([...minima.usable]).toEqual([0, 0]);
  expect(minima.reason[0]).toContain('323 of 365 days missing, 18 allowed');
  expect([...minima.minimum]).toEqual([5, 5]);
});

test('annualMinima: missing days at the ends of the record make no years', () => {
  const padded = withGap(withGap(record, 0, 364), 1095, 1460);
  expect([...annualMinima(padded, OPTIONS).years]).toEqual([2002, 2003]);
});

test('annualMinima of a record without a value has no years', () => {
  expect(annualMinima(withGap(record, 0, 1460), OPTIONS).years).toHaveLength(0);
  expect(annualMinima(seriesOf([2001, 1, 1], []), OPTIONS).reason).toEqual([]);
});

test('annualMinima: excluded days are missing and flagged, others only flagged', () => {
  const flagged = withFlag(withFlag(record, 'provisional', 100, 129), 'ice', 365, 369);
  const minima = annualMinima(flagged, OPTIONS);
  expect([...minima.flaggedDays]).toEqual([30, 5, 0, 0]);
  expect([...minima.missingDays]).toEqual([30, 0, 0, 0]);
  expect(minima.reason[0]).toContain('30 of 365 days missing, 18 allowed');
  expect([...annualMinima(flagged, { ...OPTIONS, exclude: [] }).missingDays]).toEqual([0, 0, 0, 0]);
});

test('annualMinima lists a year whose values are all excluded, without a minimum', () => {
  const minima = annualMinima(withFlag(record, 'provisional', 1095, 1460), OPTIONS);
  expect(minima.years[3]).toBe(2004);
  expect([minima.minimum[3], minima.day[3], minima.zeroDays[3], minima.meanFlow[3]]).toEqual([
    Number.NaN,
    -1,
    Number.NaN,
    Number.NaN,
  ]);
  expect(minima.reason[3]).toContain('366 of 366 days missing');
});

test('annualMinima counts zero days per observed day, values below detection among them, excluded ones not', () => {
  const dry = seriesOf([2001, 1, 1], { days: 365, flow: (i) => (i < 20 ? 0 : 0.5) });
  const withBelow = withFlag(withGap(dry, 300, 309), 'below-detection', 100, 104);
  expect(annualMinima(withBelow, OPTIONS).zeroDays[0]).toBeCloseTo((25 * 365) / 355, 12);
  expect(annualMinima(withBelow, { ...OPTIONS, exclude: ['below-detection'] }).zeroDays[0]).toBeCloseTo(
    (20 * 365) / 350,
    12,
  );
});

test('annualMinima in a season looks at its days only', () => {
  const minima = annualMinima(record, { ...OPTIONS, season: [5, 6] });
  expect([...minima.minimum]).toEqual([10, 10, 10, 10]);
  expect(Array.from(minima.day, isoDate)).toEqual(['2001-05-07', '2002-05-07', '2003-05-07', '2004-05-07']);
  // A gap outside the season does no harm, one inside counts against the allowance scaled to the season.
  const gappy = withGap(withGap(record, 0, 60), 365 + 121, 365 + 124);
  const seasonal = annualMinima(gappy, { ...OPTIONS, season: [5, 6] });
  expect([...seasonal.missingDays]).toEqual([0, 4, 0, 0]);
  expect(seasonal.reason[1]).toContain('4 of 61 days missing, 3.008 allowed');
});

test('annualMinima: a window longer than the season leaves no minimum and says so', () => {
  const minima = annualMinima(record, { ...OPTIONS, season: [6, 6], days: 31 });
  expect(minima.minimum[0]).toBeNaN();
  expect(minima.reason[0]).toBe('no 31-day window fits into the 30 days of the season');
});

test('annualMinima: n = 365 has one window in a year of 365 days and two in a leap year', () => {
  const minima = annualMinima(seriesOf([2003, 1, 1], { days: 731, flow: (i) => (i < 365 ? 1 : i === 365 ? 366 : 1) }), {
    ...OPTIONS,
    days: 365,
  });
  expect([...minima.minimum]).toEqual([1, 1]);
  expect(Array.from(minima.day, isoDate)).toEqual(['2003-12-31', '2004-12-31']);
});

test('annualMinima leaves the record as it was', () => {
  const flagged = withFlag(record, 'provisional', 100, 129);
  const [values, flags] = [flagged.values.slice(), flagged.flags.slice()];
  annualMinima(flagged, OPTIONS);
  expect(flagged.values).toEqual(values);
  expect(flagged.flags).toEqual(flags);
});

test('annualMinima refuses options that cannot be', () => {
  expect(() => annualMinima(record, { ...OPTIONS, days: 0 })).toThrow(
    'annualMinima: days must be a whole number of at least 1, got 0',
  );
  expect(() => annualMinima(record, { ...OPTIONS, maxMissingDays: -1 })).toThrow(RangeError);
  expect(() => annualMinima(record, { ...OPTIONS, yearStart: 0 })).toThrow(RangeError);
  expect(() => annualMinima(record, { ...OPTIONS, yearStart: 4, season: [3, 5] })).toThrow(RangeError);
});

test('annualMinima: a year whose flows add up to infinity is not usable, and the others are', () => {
  const huge = seriesOf([2001, 1, 1], { days: 730, flow: (i) => (i < 365 ? 1e308 : 5 + (i % 3)) });
  const minima = annualMinima(huge, OPTIONS);
  expect([...minima.usable]).toEqual([0, 1]);
  expect(minima.reason).toEqual(['flows so large that their sum is infinite: correct them in the file', '']);
});
