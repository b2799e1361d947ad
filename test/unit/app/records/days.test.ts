import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dayAt, dayX, layOutDays } from '@/app/regions/[region]/records/_year/day-layout';
import { dayColumns, dayWords, stretchesOf } from '@/app/regions/[region]/records/_year/days-answer';
import { flowAxis, tickText } from '@/app/regions/[region]/records/_year/flow-axis';
import { inYear, lanesOf } from '@/app/regions/[region]/records/_year/year-lanes';
import { findingOf } from './records-builder.ts';

const answer = {
  unit: 'm3/s',
  dates: ['1970-01-03', '1970-01-04', '1970-01-05'],
  values: [1.5, null, 0],
  flags: [16, 0, 32],
  texts: ['e', '', ''],
};

describe('dayColumns', () => {
  test('lays the days on the stretch asked for, those outside the record missing', () => {
    const columns = dayColumns(answer, 0, 5, 2);
    expect([...columns.values]).toEqual([Number.NaN, Number.NaN, 3, Number.NaN, 0, Number.NaN]);
    expect([...columns.flags]).toEqual([0, 0, 16, 0, 32, 0]);
    expect(columns.texts).toEqual(['', '', 'e', '', '', '']);
  });

  test('without an answer every day is missing', () => {
    expect([...dayColumns(null, 3, 4).values]).toEqual([Number.NaN, Number.NaN]);
    expect(dayColumns({ ...answer, dates: [], values: [], flags: [], texts: [] }, 3, 4).values).toHaveLength(2);
  });
});

test('dayWords tells value, flags and the code as written', () => {
  const columns = dayColumns(answer, 0, 5);
  const text = (value: number) => `${value} m³/s`;
  expect(dayWords(columns, 2, text)).toBe('1970-01-03: 1.5 m³/s; suspect; written “e”');
  expect(dayWords(columns, 3, text)).toBe('1970-01-04: no value');
  expect(dayWords(columns, 4, text)).toBe('1970-01-05: 0 m³/s; rejected');
});

test('stretchesOf are the runs of days', () => {
  const holds = [true, false, true, true, false, true];
  expect(stretchesOf(10, 6, (at) => holds[at])).toEqual([
    [10, 10],
    [12, 13],
    [15, 15],
  ]);
  expect(stretchesOf(10, 0, () => true)).toEqual([]);
});

test('dayAt finds the day in whose middle dayX lies, at any width', () => {
  fc.assert(
    fc.property(fc.integer({ min: 200, max: 2000 }), fc.integer({ min: 0, max: 365 }), (width, at) => {
      const layout = layOutDays(width, 5000, 366, 3);
      expect(dayAt(layout, (dayX(layout, 5000 + at) + dayX(layout, 5001 + at)) / 2)).toBe(5000 + at);
    }),
  );
  const layout = layOutDays(800, 5000, 366, 0);
  expect(dayAt(layout, -50)).toBe(5000);
  expect(dayAt(layout, 5000)).toBe(5365);
});

describe('flowAxis', () => {
  test('a logarithmic axis puts a tenfold flow equally far up everywhere, and zeros on its floor', () => {
    const { y, least } = flowAxis([0.1, 1, 10, 0, Number.NaN], 'log', 200);
    expect(y(0.1) - y(1)).toBeCloseTo(y(1) - y(10), 9);
    expect(y(0)).toBe(200);
    expect(y(-3)).toBe(200);
    expect(least).toBeLessThan(0.1);
  });

  test('a linear axis holds zero, and negative flows where there are some', () => {
    expect(flowAxis([5, 10], 'linear', 200).y(0)).toBe(200);
    const { y, ticks } = flowAxis([-4, 10], 'linear', 200);
    expect(y(-4)).toBeLessThanOrEqual(200);
    expect(ticks.some((tick) => tick < 0)).toBe(true);
  });

  test('all zero, or nothing at all, still makes an axis', () => {
    for (const values of [[0, 0], [], [Number.NaN]]) {
      for (const kind of ['log', 'linear'] as const) {
        const { y, ticks } = flowAxis(values, kind, 200);
        expect(y(0)).toBe(200);
        expect(ticks.length).toBeGreaterThan(0);
        expect(new Set(ticks.map(tickText)).size).toBe(ticks.length);
      }
    }
  });

  test('its labels never stand closer than 16 pixels', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 10, noNaN: true }),
        fc.double({ min: 1.01, max: 1e6, noNaN: true }),
        (low, times) => {
          const { ticks, y } = flowAxis([low, low * times], 'log', 240);
          expect(ticks.length).toBeGreaterThan(0);
          for (let i = 1; i < ticks.length; i++) expect(y(ticks[i - 1]) - y(ticks[i])).toBeGreaterThanOrEqual(15.99);
        },
      ),
      { numRuns: 2000 },
    );
  });
});

test('tickText writes no digit more than the tick has', () => {
  expect([0.05, 3, 30, 2000, -0.5, 0, 0.1 + 0.2].map(tickText)).toEqual([
    ...['0.05', '3', '30', '2,000', '−0.5', '0', '0.3'],
  ]);
});

test('lanesOf has a lane for each flag, kind of finding and mark that touches the days, and for no other', () => {
  const columns = dayColumns(answer, 0, 5);
  const mark = { id: 1, code: 'A', quantity: 'flow', reason: 'r', by: '', createdAt: '' } as const;
  const lanes = lanesOf(
    columns,
    [
      findingOf({ kind: 'jump', first: '1970-01-03', last: '1970-01-03' }),
      findingOf({ kind: 'flat', first: '1971-01-01', last: '1971-02-01' }),
    ],
    [
      { ...mark, kind: 'note', first: '1969-12-01', last: '1970-01-01' },
      { ...mark, kind: 'accept', first: '1975-01-01', last: '1975-01-01' },
    ],
  );
  expect(lanes.map(({ label, stretches }) => [label, stretches])).toEqual([
    ['suspect', [[2, 2]]],
    ['rejected', [[4, 4]]],
    ['jump', [[2, 2]]],
    ['noted', [[-31, 0]]],
  ]);
});

test('inYear keeps what touches the year, its first and last day included', () => {
  const at = (first: string, last: string) => ({ first, last });
  const rows = [at('1969-12-31', '1970-01-01'), at('1970-01-06', '1970-01-09'), at('1970-01-07', '1970-01-09')];
  expect(inYear(rows, 0, 5)).toEqual(rows.slice(0, 2));
});
