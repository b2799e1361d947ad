import { expect, test } from 'vitest';
import { PageMemory } from '../../../lib/intake/page-memory.ts';
import { FILLED, NEW_DAY, OTHER_CODE, OTHER_VALUE, SAME_VALUE, StationDays } from '../../../lib/intake/station-days.ts';
import { NO_ROW } from '../../../lib/series/day-codes.ts';

test('StationDays.run lays rows in any order on consecutive days, with NO_ROW and NaN between', () => {
  const record = new StationDays(new PageMemory());
  expect(record.run()).toBeNull();
  for (const day of [5, -3, 2]) expect(record.put(day, day / 10, 1)).toBe(NEW_DAY);
  const run = record.run();
  expect(run?.firstDay).toBe(-3);
  expect([...(run?.values ?? [])]).toEqual([-0.3, NaN, NaN, NaN, NaN, 0.2, NaN, NaN, 0.5]);
  expect([...(run?.codes ?? [])]).toEqual([1, NO_ROW, NO_ROW, NO_ROW, NO_ROW, 1, NO_ROW, NO_ROW, 1]);
});

test('StationDays.put merges equal values, lets a value fill a missing day, and refuses an unlike value unchanged', () => {
  const record = new StationDays(new PageMemory());
  record.put(1, 4, 0);
  expect(record.put(1, 4, 0)).toBe(SAME_VALUE);
  expect(record.put(1, 4, 1)).toBe(OTHER_CODE);
  expect(record.put(1, Number.NaN, 2)).toBe(SAME_VALUE);
  expect(record.put(1, 4.5, 0)).toBe(OTHER_VALUE);
  record.put(2, Number.NaN, 2);
  expect(record.put(2, Number.NaN, 2)).toBe(SAME_VALUE);
  expect(record.put(2, 7, 0)).toBe(FILLED);
  expect(record.duplicates).toBe(5);
  expect([...(record.run()?.values ?? [])]).toEqual([4, 7]);
  expect([...(record.run()?.codes ?? [])]).toEqual([0, 0]);
});

test.each([
  ['in memory', {}],
  ['packed', { open: 0 }],
  ['in a file', { open: 0, packed: 0 }],
  ['packed in part', { open: 2, packed: 3 }],
])('StationDays gives back 40 years value for value, its pages %s', (_where, limits) => {
  const memory = new PageMemory(limits);
  const records = [new StationDays(memory), new StationDays(memory)];
  const value = (day: number, station: number): number => {
    if (day % 97 === 0) return Number.NaN;
    // Whole numbers, two decimals, nine decimals, more digits than packing holds, huge and negative ones.
    if (day % 2000 === 1500) return Math.PI * day;
    if (day % 3000 === 2500) return 1e12 + day;
    return [day % 50, (day % 1237) / 100, 0.000000123 * (day % 11), -(day % 13) / 10][(day >> 10) % 4] + station;
  };
  for (let day = -5000; day < 9600; day++)
    for (const [at, record] of records.entries()) record.put(day, value(day, at), ((day % 7) + 7) % 7);
  // Going back over early pages must find them as they were.
  for (let day = -5000; day < 9600; day += 500)
    for (const [at, record] of records.entries()) {
      expect(record.put(day, value(day, at), ((day % 7) + 7) % 7)).toBe(SAME_VALUE);
    }
  for (const [at, record] of records.entries()) {
    const run = record.run();
    expect(run?.firstDay).toBe(-5000);
    const expected = Float64Array.from({ length: 14600 }, (_, index) => value(index - 5000, at));
    expect(run?.values).toEqual(expected);
    expect(run?.codes[14599]).toBe(9599 % 7);
  }
});
