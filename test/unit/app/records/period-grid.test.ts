import { describe, expect, test } from 'vitest';
import {
  hitPeriod,
  layOutPeriods,
  periodAfterKey,
  periodCount,
  periodsByWorth,
  periodXY,
  toneSteps,
} from '@/app/regions/[region]/records/_periods/period-grid';
import { kept } from '@/app/regions/[region]/records/_periods/period-words';
import { periodsOf } from './records-builder.ts';

const periods = periodsOf({ '2000-2002': 8, '2000-2004': 4, '2001-2004': 5, '2002-2004': 9 });

test('periodCount multiplies stations by years, and knows no period that is too short or outside', () => {
  expect(periodCount(periods, 2001, 2004)).toEqual({
    ...{ first: 2001, last: 2004, ranked: 5, complete: 5 },
    stationYears: 20,
  });
  expect(periodCount(periods, 2001, 2002)).toBeNull();
  expect(periodCount(periods, 1999, 2004)).toBeNull();
  expect(periodCount(periods, 2001, 2005)).toBeNull();
});

test('periodsByWorth: most station-years first; of equal ones the later last year, then the earlier first', () => {
  expect(periodsByWorth(periods).map(({ first, last, stationYears }) => [first, last, stationYears])).toEqual([
    [2002, 2004, 27],
    [2000, 2002, 24],
    [2000, 2004, 20],
    [2001, 2004, 20],
  ]);
});

describe('layOutPeriods', () => {
  const layout = layOutPeriods(periods, 400)!;

  test('has a cell for every period of at least minYears: 3 × 3, the lower left half empty', () => {
    expect(layout.count).toBe(3);
    const hits: unknown[] = [];
    for (let row = 0; row < 3; row++) {
      for (let column = 0; column < 3; column++) {
        const x = layout.left + (column + 0.5) * layout.cellWidth;
        const y = layout.top + (row + 0.5) * layout.cellHeight;
        hits.push(hitPeriod(layout, x, y));
      }
    }
    expect(hits).toEqual([
      ...[
        [2000, 2002],
        [2000, 2003],
        [2000, 2004],
      ],
      ...[null, [2001, 2003], [2001, 2004]],
      ...[null, null, [2002, 2004]],
    ]);
  });

  test('periodXY is where hitPeriod finds the period again', () => {
    const [x, y] = periodXY(layout, 2001, 2004);
    expect(hitPeriod(layout, x + 1, y + 1)).toEqual([2001, 2004]);
    expect(hitPeriod(layout, layout.left - 1, layout.top + 1)).toBeNull();
  });

  test('is null when no period is long enough', () => {
    expect(layOutPeriods(periodsOf({}, { minYears: 6 }), 400)).toBeNull();
    expect(layOutPeriods({ ...periods, firstYear: null, lastYear: null }, 400)).toBeNull();
  });

  test('fits 90 years into a phone', () => {
    const long = layOutPeriods(periodsOf({}, { firstYear: 1930, lastYear: 2020, minYears: 20 }), 358)!;
    expect(long.width).toBeLessThanOrEqual(358);
  });
});

test('periodAfterKey: left and right move the end, up and down the start, and a period never becomes too short', () => {
  const layout = layOutPeriods(periods, 400)!;
  expect(periodAfterKey(layout, null, 'ArrowLeft')).toEqual([2000, 2004]);
  expect(periodAfterKey(layout, [2000, 2003], 'ArrowRight')).toEqual([2000, 2004]);
  expect(periodAfterKey(layout, [2000, 2003], 'ArrowDown')).toEqual([2001, 2003]);
  expect(periodAfterKey(layout, [2001, 2003], 'ArrowDown')).toEqual([2001, 2003]);
  expect(periodAfterKey(layout, [2001, 2003], 'ArrowLeft')).toEqual([2001, 2003]);
  expect(periodAfterKey(layout, [2000, 2004], 'ArrowUp')).toEqual([2000, 2004]);
  expect(periodAfterKey(layout, [2000, 2004], 'x')).toBeNull();
});

test('toneSteps are five where there is room, and as many as there are stations where there is not', () => {
  expect(toneSteps(31)).toEqual([1, 7, 13, 19, 25]);
  expect(toneSteps(2)).toEqual([1, 2]);
  expect(toneSteps(1)).toEqual([1]);
});

test('kept says stations, station-years, and who only runs dry', () => {
  expect(kept({ first: 2001, last: 2004, ranked: 5, complete: 7, stationYears: 20 }, 9)).toBe(
    '5 of 9 stations, 20 station-years; 2 more would be complete but run dry too often to be ranked',
  );
  expect(kept(null, 9)).toMatch(/^no station/);
});
