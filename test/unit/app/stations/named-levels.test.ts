import { expect, test } from 'vitest';
import {
  monthsText,
  namedFlowText,
  namedLevels,
} from '../../../../app/regions/[region]/stations/[code]/named-levels.ts';
import type { NamedFlow } from '../../../../lib/series/station-history.ts';

test.each([
  [[5, 6, 7, 11], 'May–Jul, Nov'],
  [[1, 2, 12], 'Dec–Feb'],
  [[3], 'Mar'],
  [[1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12], 'all year'],
  [null, 'all year'],
])('monthsText of %j is "%s"', (months, words) => {
  expect(monthsText(months)).toBe(words);
});

test('namedLevels are m³/s; a depth over an unknown area has no level', () => {
  const flow = (value: number, unit: NamedFlow['unit'], months: number[] | null = null): NamedFlow => ({
    ...{ name: unit, kind: 'legal minimum', value, unit, months },
  });
  const levels = namedLevels([flow(500, 'L/s', [5, 6]), flow(1, 'mm/d')], 86.4);
  expect(levels).toEqual([
    { name: 'L/s', flow: 0.5, label: 'L/s, May–Jun' },
    { name: 'mm/d', flow: 1, label: 'mm/d' },
  ]);
  expect(namedLevels([flow(1, 'mm/d')], null)).toEqual([]);
  expect(namedFlowText(flow(0.64, 'm3/s', [7]))).toBe('0.64 m³/s, Jul (legal minimum)');
});
