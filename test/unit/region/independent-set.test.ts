import { describe, expect, test } from 'vitest';
import { independentSet, type LastingStation } from '../../../lib/region/independent-set.ts';

const station = (code: string, keys: Partial<LastingStation> = {}): LastingStation => ({
  code,
  river: `River ${code}`,
  areaKm2: 100,
  valuedDays: 10_000,
  ...keys,
});
const set = (...args: Parameters<typeof independentSet>) => {
  const { kept, pairs } = independentSet(...args);
  return { kept: [...kept].sort().join(''), pairs };
};

describe('independentSet', () => {
  test('keeps the longer of two records on one river whose areas are more than half alike', () => {
    const upper = station('U', { river: 'Wye ', areaKm2: 60, valuedDays: 12_000 });
    const lower = station('L', { river: ' wye', areaKm2: 100 });
    expect(set([upper, lower], [])).toEqual({
      kept: 'U',
      pairs: [{ kept: 'U', left: 'L', reason: 'area-ratio', figure: 0.6 }],
    });
    expect(set([{ ...upper, areaKm2: 50 }, lower], []).kept).toBe('LU');
    expect(set([{ ...upper, areaKm2: 50.01 }, lower], []).kept).toBe('U');
  });

  test('tells nothing by area where a river is not named, or an area not known', () => {
    expect(set([station('A', { river: '' }), station('B', { river: '' })], []).kept).toBe('AB');
    const alike = { river: 'Wye' };
    expect(set([station('A', { ...alike, areaKm2: null }), station('B', alike)], []).kept).toBe('AB');
    expect(set([station('A', { ...alike, areaKm2: 0 }), station('B', { ...alike, areaKm2: 0 })], []).kept).toBe('AB');
  });

  test('keeps one of two whose flows correlate by more than 0.95, the lower code of equally long records', () => {
    const pair = (correlation: number) => [{ a: 'B', b: 'A', correlation }];
    expect(set([station('B'), station('A')], pair(0.96))).toEqual({
      kept: 'A',
      pairs: [{ kept: 'A', left: 'B', reason: 'correlation', figure: 0.96 }],
    });
    expect(set([station('B'), station('A')], pair(0.95)).kept).toBe('AB');
  });

  test('leaves a station out only beside one that stays', () => {
    const chain = [
      { a: 'A', b: 'B', correlation: 0.97 },
      { a: 'B', b: 'C', correlation: 0.98 },
    ];
    const stations = [
      station('A', { valuedDays: 3 }),
      station('B', { valuedDays: 2 }),
      station('C', { valuedDays: 1 }),
    ];
    expect(set(stations, chain)).toEqual({
      kept: 'AC',
      pairs: [{ kept: 'A', left: 'B', reason: 'correlation', figure: 0.97 }],
    });
    // the middle one has the longest record: both of its neighbours fall out
    expect(set([stations[0], { ...stations[1], valuedDays: 9 }, stations[2]], chain).kept).toBe('B');
  });

  test('answers no station and one station', () => {
    expect(set([], [])).toEqual({ kept: '', pairs: [] });
    expect(set([station('A')], [])).toEqual({ kept: 'A', pairs: [] });
  });

  test('ignores correlations with stations that are not ranked', () => {
    expect(set([station('A')], [{ a: 'A', b: 'Z', correlation: 0.99 }]).kept).toBe('A');
  });
});
