import { describe, expect, test } from 'vitest';
import {
  hitWindow,
  layOutWindows,
  windowAfterKey,
  windowXY,
  type YearWindow,
} from '@/app/components/start-end/window-grid';

const STARTS = [1980, 1981, 1982, 1984];
const ENDS = [1994, 1995, 1996, 1998];
/** Windows of at least 15 years, none from or to a year that is missing above. */
const has = ([start, end]: YearWindow) => STARTS.includes(start) && ENDS.includes(end) && end - start >= 14;

const grid = layOutWindows(STARTS, ENDS, 400);
if (!grid) throw new Error('the chart has windows');

describe('layOutWindows', () => {
  test('gives years without an answer their room: the axes are real time', () => {
    const [x1996] = windowXY(grid, [1980, 1996]);
    const [x1998] = windowXY(grid, [1980, 1998]);
    expect(x1998 - x1996).toBeCloseTo(2 * grid.cellWidth);
  });
  test('fits into the width there is, and is wider only when cells would vanish', () => {
    expect(grid.width).toBeLessThanOrEqual(400);
    const years = Array.from({ length: 200 }, (_, i) => 1800 + i);
    expect(layOutWindows(years, years, 300)?.cellWidth).toBe(3);
  });
  test('answers null without windows', () => {
    expect(layOutWindows([], [], 400)).toBeNull();
  });
});

describe('hitWindow', () => {
  test('finds every cell by its middle', () => {
    for (let start = 1980; start <= 1984; start++) {
      for (let end = 1994; end <= 1998; end++) {
        const [x, y] = windowXY(grid, [start, end]);
        expect(hitWindow(grid, x + grid.cellWidth / 2, y + grid.cellHeight / 2)).toEqual([start, end]);
      }
    }
  });
  test('answers null beside the chart', () => {
    const [x, y] = windowXY(grid, [1980, 1994]);
    expect(hitWindow(grid, x - 1, y + 1)).toBeNull();
    expect(hitWindow(grid, x + 1, y - 1)).toBeNull();
    expect(hitWindow(grid, grid.width, y + 1)).toBeNull();
  });
});

describe('windowAfterKey', () => {
  test('begins at the longest window', () => {
    expect(windowAfterKey(grid, has, null, 'ArrowDown')).toEqual([1980, 1998]);
    expect(windowAfterKey(grid, has, [1982, 1996], 'Home')).toEqual([1980, 1998]);
  });
  test('goes over years without an answer, and stays where there is none that way', () => {
    expect(windowAfterKey(grid, has, [1980, 1998], 'ArrowLeft')).toEqual([1980, 1996]);
    expect(windowAfterKey(grid, has, [1982, 1998], 'ArrowDown')).toEqual([1984, 1998]);
    expect(windowAfterKey(grid, has, [1984, 1998], 'ArrowDown')).toEqual([1984, 1998]);
    expect(windowAfterKey(grid, has, [1984, 1998], 'ArrowLeft')).toEqual([1984, 1998]);
  });
  test('End goes to the latest window, and other keys are left to the page', () => {
    expect(windowAfterKey(grid, has, [1980, 1994], 'End')).toEqual([1984, 1998]);
    expect(windowAfterKey(grid, has, [1980, 1994], 'a')).toBeNull();
  });
});
