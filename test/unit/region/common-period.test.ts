import { expect, test } from 'vitest';
import { commonPeriod } from '../../../lib/region/common-period.ts';
import { annualMinima, constant } from './region-fixtures.ts';

const full = (first: number, last: number, value = 1) =>
  annualMinima({ first, values: constant(last - first + 1, value) });
const rule = (minYears: number, minCoverage = 1) => ({ minYears, minCoverage });

test('commonPeriod takes the largest stations × years', () => {
  // 1981–2020: 2 × 40 = 80; 1991–2020: 3 × 30 = 90; 1981–2010: 2 × 30; 1991–2010: 3 × 20
  const stations = [full(1981, 2020), full(1981, 2020), full(1991, 2020)];
  expect(commonPeriod(stations, rule(20))).toEqual({ period: [1991, 2020], ranked: 3 });
  // a short record is left out when it costs more than it brings: 1981–2020: 2 × 40; 2001–2020: 3 × 20 = 60
  expect(commonPeriod([...stations.slice(0, 2), full(2001, 2020)], rule(20))).toEqual({
    period: [1981, 2020],
    ranked: 2,
  });
});

test('commonPeriod breaks ties by the later last year, then the earlier first', () => {
  // 1981–2010 (2 stations) and 1991–2020 (2) and 1991–2010 (3) all come to 60
  const stations = [full(1981, 2010), full(1991, 2020), full(1981, 2020)];
  expect(commonPeriod(stations, rule(20))).toEqual({ period: [1991, 2020], ranked: 2 });
  // 2011–2020 (4 × 10) and 2001–2020 (2 × 20) end in the same year
  const sameEnd = [full(2001, 2020), full(2001, 2020), full(2011, 2020), full(2011, 2020)];
  expect(commonPeriod(sameEnd, rule(10))).toEqual({ period: [2001, 2020], ranked: 2 });
});

test('commonPeriod needs minYears: below, at and above', () => {
  expect(commonPeriod([full(2001, 2019)], rule(20))).toEqual({ period: null, ranked: 0 });
  expect(commonPeriod([full(2001, 2020)], rule(20))).toEqual({ period: [2001, 2020], ranked: 1 });
  expect(commonPeriod([full(2001, 2021)], rule(20))).toEqual({ period: [2001, 2021], ranked: 1 });
});

test('commonPeriod counts a station only with enough of the first and of the last ten years', () => {
  // the last six of 1991–2030 are missing: 34 of 40 is 0.85, but 4 of the last ten are not 8, so it ends in 2026
  const ends = annualMinima({ first: 1991, values: [...constant(34), ...constant(6, Number.NaN)] });
  const other = full(1991, 2030);
  // both to 2026: 2 × 36 = 72 beats the other alone to 2030: 40
  expect(commonPeriod([ends, other], rule(20, 0.8))).toEqual({ period: [1991, 2026], ranked: 2 });
  const starts = annualMinima({ first: 1991, values: [...constant(6, Number.NaN), ...constant(34)] });
  expect(commonPeriod([starts, other], rule(20, 0.8))).toEqual({ period: [1995, 2030], ranked: 2 });
});

test('commonPeriod lets a gap in the middle cost no more than coverage says', () => {
  const gap = annualMinima({ first: 1981, values: [...constant(16), ...constant(8, Number.NaN), ...constant(16)] });
  expect(commonPeriod([gap], rule(20, 0.8))).toEqual({ period: [1981, 2020], ranked: 1 });
  const wider = annualMinima({ first: 1981, values: [...constant(16), ...constant(9, Number.NaN), ...constant(15)] });
  expect(commonPeriod([wider], rule(31, 0.8)).ranked).toBe(0);
});

test('commonPeriod looks only at years between the first and last usable one', () => {
  // with 80 % two empty years at either end would pass, and make a longer period of nothing
  const padded = annualMinima({ first: 1979, values: [Number.NaN, Number.NaN, ...constant(30), Number.NaN] });
  expect(commonPeriod([padded], rule(20, 0.8))).toEqual({ period: [1981, 2010], ranked: 1 });
});

test('commonPeriod does not count a station with a third or more zero minima', () => {
  const zeros = (count: number) =>
    annualMinima({ first: 1991, values: [...constant(30 - count), ...constant(count, 0)] });
  expect(commonPeriod([zeros(9)], rule(30))).toEqual({ period: [1991, 2020], ranked: 1 });
  // a third is too many
  expect(commonPeriod([zeros(10)], rule(30))).toEqual({ period: [1991, 2020], ranked: 0 });
  // the window without most zeros ranks it
  expect(commonPeriod([zeros(10)], rule(20))).toEqual({ period: [1991, 2019], ranked: 1 });
});

test('commonPeriod of intermittent stations alone serves most of them', () => {
  const dry = (first: number) => annualMinima({ first, values: constant(2020 - first + 1, 0) });
  expect(commonPeriod([dry(1961), dry(1991), dry(1991), dry(1991)], rule(20))).toEqual({
    period: [1991, 2020],
    ranked: 0,
  });
});

test('commonPeriod of records too thin for any ranking is the whole span', () => {
  const thin = annualMinima({ first: 1981, values: Array.from({ length: 40 }, (_, i) => (i % 3 ? Number.NaN : 1)) });
  expect(commonPeriod([thin], rule(20, 0.8))).toEqual({ period: [1981, 2020], ranked: 0 });
});

test('commonPeriod of no station, or none with a usable year, is none', () => {
  expect(commonPeriod([], rule(20))).toEqual({ period: null, ranked: 0 });
  expect(commonPeriod([annualMinima({ first: 1981, values: constant(40, Number.NaN) })], rule(20)).period).toBeNull();
});

test('commonPeriod refuses rules that make no sense', () => {
  expect(() => commonPeriod([], rule(0))).toThrow('minYears must be a whole number of at least 1, got 0');
  expect(() => commonPeriod([], rule(20, 80))).toThrow('minCoverage must lie in 0..1, got 80');
});
