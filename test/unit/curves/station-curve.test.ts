import { expect, test } from 'vitest';
import { STANDARD_EXCEEDANCES } from '../../../lib/curves/exceedances.ts';
import { medianAnnualCurve } from '../../../lib/curves/median-annual-curve.ts';
import { concatenate, stationCurve } from '../../../lib/curves/station-curve.ts';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { seriesOf, withFlag, withGap } from '../series-of.ts';

const OPTIONS = { yearStart: 1, season: null, days: 7, maxMissingDays: 18, exclude: ['provisional' as const] };
const at = (p: number) => STANDARD_EXCEEDANCES.indexOf(p);

/** Ten calendar years 2001–2010 of 365 or 366 days: day k of year y has flow (k + 1) × (y − 2000) m³/s. */
const YEAR_STARTS = Array.from({ length: 11 }, (_, y) => Math.floor(365.25 * y));
const yearOf = (i: number) => YEAR_STARTS.findLastIndex((start) => start <= i);
const record = seriesOf([2001, 1, 1], {
  days: YEAR_STARTS[10],
  flow: (i) => (i - YEAR_STARTS[yearOf(i)] + 1) * (yearOf(i) + 1),
});

test('STANDARD_EXCEEDANCES rise from 0.001 to 0.999 and hold every percent', () => {
  expect(STANDARD_EXCEEDANCES).toHaveLength(105);
  expect([STANDARD_EXCEEDANCES[0], STANDARD_EXCEEDANCES.at(-1)]).toEqual([0.001, 0.999]);
  for (let i = 1; i < 105; i += 1) expect(STANDARD_EXCEEDANCES[i]).toBeGreaterThan(STANDARD_EXCEEDANCES[i - 1]);
  for (let percent = 1; percent < 100; percent += 1) expect(STANDARD_EXCEEDANCES).toContain(percent / 100);
});

test('stationCurve pools the days of usable years in the period', () => {
  const curve = stationCurve(record, annualMinima(record, OPTIONS), OPTIONS, [2001, 2001]);
  expect([curve.days, curve.years, curve.mean, curve.median]).toEqual([365, 1, 183, 183]);
  expect(curve.flows[at(0.5)]).toBe(183);
  // 366 × 0.002 is below rank 1: the year says nothing so far out
  expect(curve.flows[at(0.002)]).toBeNaN();
  expect(curve.flows[at(0.995)]).toBeCloseTo(366 * 0.005, 9);
});

test('stationCurve leaves out years that are not usable and days that are missing or excluded', () => {
  const gappy = withFlag(withGap(record, 300, 364), 'provisional', 365 + 340, 365 + 349);
  const curve = stationCurve(gappy, annualMinima(gappy, OPTIONS), OPTIONS, [2001, 2002]);
  expect([curve.years, curve.days]).toEqual([1, 355]);
  expect(curve.median).toBe(2 * 178);
});

test('stationCurve in a season looks at its days only', () => {
  const june = { ...OPTIONS, season: [6, 6] as [number, number] };
  const curve = stationCurve(record, annualMinima(record, june), june, [2001, 2001]);
  expect([curve.days, curve.mean]).toEqual([30, (152 + 181) / 2]);
});

test('stationCurve without a usable year has no flow, and says so by counts', () => {
  const curve = stationCurve(record, annualMinima(record, OPTIONS), OPTIONS, [1990, 1995]);
  expect([curve.days, curve.years, curve.mean, curve.median]).toEqual([0, 0, Number.NaN, Number.NaN]);
  expect(curve.flows.every(Number.isNaN)).toBe(true);
});

test('stationCurve leaves record and minima as they were', () => {
  const flagged = withFlag(record, 'provisional', 3, 4);
  const [values, minima] = [flagged.values.slice(), annualMinima(flagged, OPTIONS)];
  const before = structuredClone(minima);
  stationCurve(flagged, minima, OPTIONS, null);
  medianAnnualCurve(flagged, minima, OPTIONS, null);
  expect(flagged.values).toEqual(values);
  expect(minima).toEqual(before);
});

test('medianAnnualCurve is the median of the years’ own curves at the positions of the shortest year', () => {
  const curve = medianAnnualCurve(record, annualMinima(record, OPTIONS), OPTIONS, [2001, 2003]);
  expect(curve.exceedances).toHaveLength(365);
  expect(curve.exceedances[0]).toBe(1 / 366);
  expect(curve.years).toBe(3);
  // The years are 1×, 2× and 3× the same ramp: the median is the second.
  expect(curve.centre[182]).toBeCloseTo(2 * 183, 9);
  expect(curve.flows[at(0.25)]).toBeCloseTo(2 * 0.75 * 366, 9);
  expect(curve.flows[at(0.001)]).toBeNaN();
  expect(curve.low.every(Number.isNaN) && curve.high.every(Number.isNaN)).toBe(true);
});

test('medianAnnualCurve has its 10–90 % band from nine years on', () => {
  const minima = annualMinima(record, { ...OPTIONS, season: [6, 6] });
  const june = { ...OPTIONS, season: [6, 6] as [number, number] };
  const nine = medianAnnualCurve(record, minima, june, [2001, 2009]);
  expect(nine.low).toHaveLength(30);
  expect(nine.low.every((low, i) => low <= nine.centre[i] && nine.centre[i] <= nine.high[i])).toBe(true);
  expect(medianAnnualCurve(record, minima, june, [2001, 2008]).low.every(Number.isNaN)).toBe(true);
});

test('medianAnnualCurve takes the length of the shortest usable year', () => {
  const gappy = withGap(record, 365 + 340, 365 + 349);
  expect(medianAnnualCurve(gappy, annualMinima(gappy, OPTIONS), OPTIONS, null).exceedances).toHaveLength(355);
});

test('medianAnnualCurve without a usable year is empty', () => {
  const curve = medianAnnualCurve(record, annualMinima(record, OPTIONS), OPTIONS, [1990, 1995]);
  expect([curve.exceedances.length, curve.centre.length, curve.years]).toEqual([0, 0, 0]);
  expect(curve.flows.every(Number.isNaN)).toBe(true);
});

test('concatenate puts parts one after another', () => {
  expect([...concatenate([Float64Array.of(1, 2), new Float64Array(0), Float64Array.of(3)])]).toEqual([1, 2, 3]);
});
