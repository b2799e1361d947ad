import { expect, test } from 'vitest';
import { cellWords, yearCell } from '@/app/regions/[region]/records/_chart/year-cell';
import { recordsOf, stationOf } from './records-builder.ts';

const station = stationOf('A', [365, 335, 0, 366], {
  flagged: { suspect: [0, 3, 0, 0], provisional: [0, 12, 0, 366] },
  usable: [1, 0, 0, 0],
  reason: [-1, 0, -1, -1],
});
const records = recordsOf([station]);

test('yearCell is null outside the record', () => {
  expect(yearCell(records, station, 1999)).toBeNull();
  expect(yearCell(records, station, 2004)).toBeNull();
  expect(yearCell(records, stationOf('B', []), 2000)).toBeNull();
});

test('yearCell tells a year that counts, one that does not, and one without values', () => {
  expect(yearCell(records, station, 2000)).toMatchObject({ state: 'counts', days: 365, values: 365, reason: '' });
  expect(yearCell(records, station, 2001)).toMatchObject({ state: 'partly', flagged: { suspect: 3, rejected: 0 } });
  expect(yearCell(records, station, 2002)).toMatchObject({ state: 'none' });
  expect(yearCell(records, station, 2003)).toMatchObject({ state: 'partly', days: 366 });
});

test('cellWords says the counts, the flags that there are and why the year does not count', () => {
  const words = (year: number) => cellWords(yearCell(records, station, year)!, 4);
  expect(words(2000)).toBe('2000/01: 365 of 365 days with a value, 0 without; the year counts');
  expect(words(2001)).toBe(
    '2001/02: 335 of 365 days with a value, 30 without; 12 provisional, 3 suspect; the year does not count: 30 days missing',
  );
  expect(words(2002)).toBe('2002/03: 0 of 365 days with a value, 365 without; no values');
});
