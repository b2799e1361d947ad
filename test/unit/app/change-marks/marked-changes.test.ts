import { expect, test } from 'vitest';
import {
  changeText,
  markedChanges,
  placeChanges,
  TAB,
  tabsHeight,
  yearPosition,
} from '../../../../app/components/change-marks/marked-changes.ts';
import { dayNumber } from '../../../../lib/calendar/day.ts';

const change = (date: string, note = '') => ({ date, kind: 'dam' as const, note });

test('markedChanges letters changes in the order of their dates and passes over what is no date', () => {
  const marked = markedChanges([change('2001-05-01'), change('soon'), change('1990-01-01', 'Filled.')]);
  expect(marked.map(({ letter, date }) => [letter, date])).toEqual([
    ['a', '1990-01-01'],
    ['b', '2001-05-01'],
  ]);
  expect(changeText(marked[0])).toBe('1990-01-01, dam: Filled.');
  expect(changeText(marked[1])).toBe('2001-05-01, dam');
  const many = markedChanges(Array.from({ length: 28 }, (_, i) => change(`${1970 + i}-01-01`)));
  expect(many.slice(25).map(({ letter }) => letter)).toEqual(['z', 'aa', 'ab']);
});

test('yearPosition puts the first day of a low-flow year at the edge before it, mid-year at its number', () => {
  expect(yearPosition(dayNumber(1990, 4, 1), 4)).toBe(1989.5);
  expect(yearPosition(dayNumber(1990, 1, 1), 1)).toBe(1989.5);
  // 31 March 1990 is the last of the 365 days of the year that began in April 1989
  expect(yearPosition(dayNumber(1990, 3, 31), 4)).toBeCloseTo(1989.5 - 1 / 365, 9);
  expect(yearPosition(dayNumber(1991, 7, 2), 1)).toBeCloseTo(1991, 2);
});

test('placeChanges leaves out what lies off the axis and puts tabs that would touch into further rows', () => {
  const marked = markedChanges(['1980', '1990', '1991', '2020'].map((year) => change(`${year}-01-01`)));
  const xOf = (day: number) => (day - dayNumber(1989, 1, 1)) / 36.525;
  const placed = placeChanges(marked, xOf, [0, 300]);
  expect(placed.map(({ letter, row }) => [letter, row])).toEqual([
    ['b', 0],
    ['c', 1],
  ]);
  expect(tabsHeight(placed)).toBe(2 * TAB.height + 2);
  expect(tabsHeight([])).toBe(0);
});
