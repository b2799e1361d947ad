import { expect, test } from 'vitest';
import { jumps } from '../../../lib/checks/jumps.ts';
import { inventedRecord } from './invented-record.ts';

/** A record with the days of [from, to] multiplied by `factor`. */
function slipped(years: number, slips: [from: number, to: number, factor: number][]) {
  const series = inventedRecord(1921, { years });
  for (const [from, to, factor] of slips) for (let day = from; day <= to; day++) series.values[day] *= factor;
  return series;
}

test('jumps finds a slipped decimal point of one day and of some days, up and down, in records long and short', () => {
  for (const years of [5, 60]) {
    const series = slipped(years, [
      [500, 500, 100],
      [900, 905, 0.01],
    ]);
    const found = jumps(series);
    expect(found.map(({ firstDay, lastDay, days }) => [firstDay, lastDay, days])).toEqual([
      [series.firstDay + 500, series.firstDay + 500, 1],
      [series.firstDay + 900, series.firstDay + 905, 6],
    ]);
    const [up, down] = found;
    expect(up.detail).toMatchObject({ before: series.values[499], value: series.values[500] });
    expect(up.detail.ratio).toBeCloseTo(series.values[500] / series.values[499], 9);
    expect(up.detail.ratio).toBeGreaterThan(Number(up.detail.limit));
    expect(down.detail.ratio).toBeCloseTo(series.values[899] / series.values[900], 9);
  }
});

test('a jump without a way back is the one day after it', () => {
  const series = slipped(20, [[4000, 20 * 366, 1000]]);
  expect(jumps(series)).toMatchObject([{ firstDay: series.firstDay + 4000, lastDay: series.firstDay + 4000, days: 1 }]);
});

test('jumps: the limit is 5 times the record’s own percentile, below, at and above', () => {
  // All ratios are 1 but four rises of 2: three of them stand above the percentile, the fourth is it.
  const flows = new Float64Array(1000).fill(1);
  for (const day of [100, 200, 300, 400]) flows.fill(flows[day - 1] * 2, day);
  const jumped = (factor: number) => {
    const values = flows.map((flow, day) => (day >= 600 ? flow * factor : flow));
    return jumps({ firstDay: 0, values, flags: new Uint8Array(1000) });
  };
  // with the jump itself there are five rises, and the fourth largest is still 2
  expect(jumped(9.99)).toEqual([]);
  expect(jumped(10)).toEqual([]);
  expect(jumped(10.01)).toMatchObject([{ firstDay: 600, days: 1, detail: { before: 16, limit: 10 } }]);
});

test('no ratio is made with a zero, a negative or a missing day, nor in a record of under a year', () => {
  const values = new Float64Array(800).fill(1);
  values.set([1, 0, 500, 1, Number.NaN, 900, Number.NaN, 1, -1, 700, -1], 300);
  values.fill(Number.NaN, 311, 312);
  expect(jumps({ firstDay: 0, values, flags: new Uint8Array(800) }).map(({ firstDay }) => firstDay)).toEqual([303]);
  const short = new Float64Array(300).fill(1);
  short[200] = 1000;
  expect(jumps({ firstDay: 0, values: short, flags: new Uint8Array(300) })).toEqual([]);
});
