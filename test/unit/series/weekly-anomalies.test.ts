import { describe, expect, test } from 'vitest';
import { dateOfDay, dayNumber } from '../../../lib/calendar/day.ts';
import { weeklyAnomalies } from '../../../lib/series/weekly-anomalies.ts';

const FIRST = dayNumber(2001, 1, 1);

describe('weeklyAnomalies', () => {
  test('leaves nothing of a flow that is its season and nothing else', () => {
    const flow = Float64Array.from({ length: 3 * 365 }, (_, i) => dateOfDay(FIRST + i).month);
    const { firstWeek, values } = weeklyAnomalies(FIRST, flow);
    expect(firstWeek).toBe(Math.floor(FIRST / 7));
    // the first and the last week are cut to three and to four days
    expect(values.findIndex((value) => Number.isNaN(value))).toBe(0);
    expect(values.slice(1).every((value) => Math.abs(value) < 1e-6)).toBe(true);
  });

  test('gives the mean log ratio of each week to its month, by hand', () => {
    // twice as much in the first fortnight as in the second, within one month of 28 days: ±(ln 2)/2
    const first = dayNumber(2001, 2, 1);
    const start = first + ((7 - (first % 7)) % 7);
    const flow = Float64Array.from({ length: 28 - (start - first) }, (_, i) => (i < 14 ? 2 : 1));
    const days = flow.length;
    const mean = (14 * Math.log(2)) / days;
    const { values } = weeklyAnomalies(start, flow);
    expect(values[0]).toBeCloseTo(Math.log(2) - mean, 6);
    expect(values[2]).toBeCloseTo(-mean, 6);
  });

  test('counts dry and missing days as missing, and a week from four days on', () => {
    const start = Math.ceil(FIRST / 7) * 7;
    const week = (days: number, filler: number) => Array.from({ length: 7 }, (_, i) => (i < days ? 5 : filler));
    const flow = Float64Array.from([...week(4, 0), ...week(3, 0), ...week(4, Number.NaN), ...week(0, 0)]);
    const { values } = weeklyAnomalies(start, flow);
    expect(Array.from(values, (value) => Number.isNaN(value))).toEqual([false, true, false, true]);
  });

  test('is the same in any unit, before 1970 too, and empty for an empty record', () => {
    const before = dayNumber(1950, 6, 3);
    const flow = Float64Array.from({ length: 90 }, (_, i) => 1 + (i % 11));
    const [one, other] = [flow, flow.map((value) => value * 35.3)].map((each) => weeklyAnomalies(before, each).values);
    expect(one).toHaveLength(Math.floor((before + 89) / 7) - Math.floor(before / 7) + 1);
    one.forEach((value, i) => {
      if (!Number.isNaN(value)) expect(value).toBeCloseTo(other[i], 5);
    });
    expect(weeklyAnomalies(before, new Float64Array()).values).toHaveLength(0);
  });
});
