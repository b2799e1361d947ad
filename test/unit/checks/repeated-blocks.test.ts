import { expect, test } from 'vitest';
import { dayNumber } from '../../../lib/calendar/day.ts';
import { repeatedBlocks } from '../../../lib/checks/repeated-blocks.ts';
import { inventedRecord } from './invented-record.ts';

function copied(from: number, to: number, days: number) {
  const series = inventedRecord(7, { years: 12, firstYear: 1991 });
  series.values.copyWithin(to, from, from + days);
  return series;
}

test('repeatedBlocks finds a copied month and a copied year at their place, with what they are copies of', () => {
  for (const days of [28, 31, 365]) {
    const series = copied(100, 1700, days);
    expect(repeatedBlocks(series)).toEqual([
      {
        ...{ kind: 'repeated', firstDay: series.firstDay + 1700, lastDay: series.firstDay + 1699 + days, days },
        detail: { copyOf: '1991-04-11' },
      },
    ]);
  }
});

test('repeatedBlocks: 27 days are none; no matter where in the record they lie', () => {
  expect(repeatedBlocks(copied(100, 1700, 27))).toEqual([]);
  for (let to = 1700; to < 1740; to++) {
    expect(repeatedBlocks(copied(100, to, 28)), `at ${to}`).toMatchObject([{ days: 28 }]);
  }
  const atStart = copied(0, 4000, 60);
  expect(repeatedBlocks(atStart)).toMatchObject([{ firstDay: atStart.firstDay + 4000, days: 60 }]);
  const atEnd = copied(500, dayNumber(2003, 1, 1) - dayNumber(1991, 1, 1) - 40, 40);
  expect(repeatedBlocks(atEnd)).toMatchObject([{ lastDay: dayNumber(2002, 12, 31), days: 40 }]);
});

test('a month pasted again and again is one block, from its second copy on', () => {
  const series = copied(100, 130, 30);
  series.values.copyWithin(160, 100, 160);
  expect(repeatedBlocks(series)).toMatchObject([
    { firstDay: series.firstDay + 130, days: 90, detail: { copyOf: '1991-04-11' } },
  ]);
});

test('a missing day parts a block', () => {
  const series = copied(100, 1700, 61);
  series.values[1730] = Number.NaN;
  expect(repeatedBlocks(series).map(({ days }) => days)).toEqual([30, 30]);
});

test('dry spells, steady releases, recessions in coarse steps and weeks that are all alike are no repetition', () => {
  const days = 4000;
  const record = (flow: (day: number) => number) => ({
    firstDay: 0,
    values: Float64Array.from({ length: days }, (_, day) => flow(day)),
    flags: new Uint8Array(days),
  });
  expect(repeatedBlocks(record(() => 0))).toEqual([]);
  expect(repeatedBlocks(record((day) => (Math.floor(day / 20) % 2 === 0 ? 3 : 5)))).toEqual([]);
  expect(repeatedBlocks(record((day) => (day % 7 < 5 ? 8 : 2)))).toEqual([]);
  const recession = (day: number) => Math.round(100 * Math.exp(-(day % 200) / 70)) / 1000;
  expect(repeatedBlocks(record(recession))).toEqual([]);
});
