import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  cellAfterKey,
  hitCell,
  layOutChart,
  rowY,
  scrollToCell,
  visibleRows,
  yearX,
} from '@/app/regions/[region]/records/_chart/chart-layout';

const layout = layOutChart(1200, 36, 1960, 2020);

describe('layOutChart', () => {
  test('fits the years into the box where they are wide enough, and grows beyond it where they are not', () => {
    expect(layout.width).toBe(1200);
    expect(yearX(layout, 2021, { left: 0, top: 0 })).toBeLessThanOrEqual(1200);
    const narrow = layOutChart(390, 36, 1850, 2020);
    expect(narrow.cell).toBe(4);
    expect(narrow.width).toBe(narrow.gutter + 171 * 4 + 8);
  });

  test('a few years do not fill a wide box', () => {
    expect(layOutChart(1400, 1, 2000, 2001).cell).toBe(26);
  });

  test('years that run backwards are refused', () => {
    expect(() => layOutChart(100, 1, 2001, 2000)).toThrow(RangeError);
  });
});

test('hitCell finds the cell whose corner yearX and rowY give, wherever the box is scrolled to', () => {
  const many = layOutChart(500, 2000, 1850, 2020);
  fc.assert(
    fc.property(
      fc.integer({ min: 0, max: 1999 }),
      fc.integer({ min: 1850, max: 2020 }),
      fc.integer({ min: 0, max: 300 }),
      fc.integer({ min: 0, max: 40_000 }),
      (row, year, left, top) => {
        const scroll = { left, top };
        const [x, y] = [yearX(many, year, scroll) + many.cell / 2, rowY(many, row, scroll) + many.rowHeight / 2];
        const hit = hitCell(many, x, y, scroll);
        if (x < many.gutter || y < many.axis) expect(hit).toBeNull();
        else expect(hit).toEqual({ row, year });
      },
    ),
  );
});

test('hitCell is null over the labels, the axis, below the last row and after the last year', () => {
  const still = { left: 0, top: 0 };
  expect(hitCell(layout, layout.gutter - 1, 100, still)).toBeNull();
  expect(hitCell(layout, 600, layout.axis - 1, still)).toBeNull();
  expect(hitCell(layout, 600, layout.axis + 36 * layout.rowHeight, still)).toBeNull();
  expect(hitCell(layout, yearX(layout, 2021, still), 100, still)).toBeNull();
});

test('visibleRows are those that the box shows, cut ones included', () => {
  const many = layOutChart(500, 2000, 2000, 2001);
  expect(visibleRows(many, many.axis + 10 * many.rowHeight, { left: 0, top: 0 })).toEqual([0, 10]);
  expect(visibleRows(many, many.axis + 10 * many.rowHeight, { left: 0, top: 1 })).toEqual([0, 11]);
  expect(visibleRows(many, many.axis + 10 * many.rowHeight, { left: 0, top: many.rowHeight })).toEqual([1, 11]);
  expect(visibleRows(many, 5000, { left: 0, top: 1995 * many.rowHeight })).toEqual([1995, 2000]);
});

test('scrollToCell moves no more than it must', () => {
  const many = layOutChart(500, 2000, 1850, 2020);
  const box = { width: 500, height: many.axis + 10 * many.rowHeight };
  const seen = { left: 0, top: 0 };
  expect(scrollToCell(many, { row: 9, year: 1850 }, box, seen)).toEqual(seen);
  expect(scrollToCell(many, { row: 10, year: 1850 }, box, seen).top).toBe(many.rowHeight);
  expect(scrollToCell(many, { row: 3, year: 1850 }, box, { left: 0, top: 500 }).top).toBe(3 * many.rowHeight);
  const { left } = scrollToCell(many, { row: 0, year: 2020 }, box, seen);
  expect(yearX(many, 2021, { left, top: 0 })).toBeLessThanOrEqual(500);
});

describe('cellAfterKey', () => {
  const at = { row: 5, year: 1990 };
  const options = { page: 10, whole: false };
  test.each([
    ['ArrowLeft', { row: 5, year: 1989 }],
    ['ArrowRight', { row: 5, year: 1991 }],
    ['ArrowUp', { row: 4, year: 1990 }],
    ['ArrowDown', { row: 6, year: 1990 }],
    ['PageUp', { row: 0, year: 1990 }],
    ['PageDown', { row: 15, year: 1990 }],
    ['Home', { row: 5, year: 1960 }],
    ['End', { row: 5, year: 2020 }],
  ])('%s', (key, place) => expect(cellAfterKey(layout, at, key, options)).toEqual(place));

  test('with Control, Home and End lead to the corners', () => {
    expect(cellAfterKey(layout, at, 'Home', { page: 10, whole: true })).toEqual({ row: 0, year: 1960 });
    expect(cellAfterKey(layout, at, 'End', { page: 10, whole: true })).toEqual({ row: 35, year: 2020 });
  });

  test('never leaves the chart, begins in a corner, and knows no other key', () => {
    expect(cellAfterKey(layout, { row: 35, year: 2020 }, 'ArrowDown', options)).toEqual({ row: 35, year: 2020 });
    expect(cellAfterKey(layout, null, 'ArrowRight', options)).toEqual({ row: 0, year: 1960 });
    expect(cellAfterKey(layout, null, 'ArrowLeft', options)).toEqual({ row: 0, year: 2020 });
    expect(cellAfterKey(layout, at, 'a', options)).toBeNull();
    expect(cellAfterKey(layOutChart(500, 0, 2000, 2001), null, 'ArrowDown', options)).toBeNull();
  });
});
