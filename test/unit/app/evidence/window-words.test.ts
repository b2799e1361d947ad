import { expect, test } from 'vitest';
import { regionCell } from '@/app/regions/[region]/evidence/_years/region-cell';
import { type WindowCounts, windowShare, windowShares } from '@/app/regions/[region]/evidence/_years/window-shares';
import { windowsSentence, windowWords } from '@/app/regions/[region]/evidence/_years/window-words';

/** Two start years by two end years; the shortest window has no station. */
const COUNTS: WindowCounts = {
  starts: [1980, 1981],
  ends: [1999, 2000],
  stations: [10, 20, 0, 10],
  negative: [6, 15, 0, 4],
  falling: [1, 10, 0, 0],
  rising: [0, 1, 0, 2],
};

test('windowShare: finds a window by its years, and none outside the chart or without stations', () => {
  expect(windowShare(COUNTS, [1980, 2000])).toEqual({
    window: [1980, 2000],
    stations: 20,
    negative: 15,
    falling: 10,
    rising: 1,
  });
  expect(windowShare(COUNTS, [1981, 1999])).toBeNull();
  expect(windowShare(COUNTS, [1979, 1999])).toBeNull();
  expect(windowShare(COUNTS, [1980, 2001])).toBeNull();
  expect(windowShare({ ...COUNTS, starts: [], ends: [] }, [1980, 1999])).toBeNull();
});

test('windowShares: lists the windows that some station has', () => {
  expect(windowShares(COUNTS).map(({ window }) => window)).toEqual([
    [1980, 1999],
    [1980, 2000],
    [1981, 2000],
  ]);
});

test('windowsSentence: the windows in which most stations fall, and the shares that fall beyond chance with their years', () => {
  expect(windowsSentence(COUNTS, '10 %')).toBe(
    'In 2 of 3 windows of at least 15 years most stations have a falling slope; the share that falls at the 10 % level, each station by itself, runs from 0\u00a0% (1981–2000) to 50\u00a0% (1980–2000).',
  );
});

test('windowsSentence: speaks of rising where more windows rise', () => {
  const rising = { ...COUNTS, negative: [1, 2, 0, 3] };
  expect(windowsSentence(rising, '5 %')).toMatch(
    /^In all 3 windows of at least 15 years most stations have a level or rising slope; the share that rises at the 5 % level/,
  );
});

test('windowsSentence: one window is told by itself, and none is null', () => {
  const one = { starts: [1980], ends: [2000], stations: [4], negative: [3], falling: [1], rising: [0] };
  expect(windowsSentence(one, '10 %')).toBe(
    'In the one window of at least 15 usable years, 1980–2000, most stations have a falling slope; 25\u00a0% of them fall at the 10 % level, each by itself.',
  );
  expect(windowsSentence({ ...one, stations: [0] }, '10 %')).toBeNull();
});

test('windowsSentence: the windows of a single station are counted, not its shares', () => {
  const one = {
    ...COUNTS,
    stations: [1, 1, 0, 1],
    negative: [1, 0, 0, 0],
    falling: [1, 0, 0, 0],
    rising: [0, 1, 0, 0],
  };
  expect(windowsSentence(one, '10 %')).toBe(
    'Of 3 windows of at least 15 usable years 1 slopes down, 1 of them at the 10 % level; 1 of the others rises at it.',
  );
});

test('windowWords: reads a window out, one and several', () => {
  const [first, second] = windowShares(COUNTS);
  expect(windowWords(first, '10 %')).toBe(
    '6 of 10 stations have a falling slope; 1 falls and 0 rise at the 10 % level',
  );
  expect(windowWords(second, '10 %')).toBe(
    '15 of 20 stations have a falling slope; 10 fall and 1 rises at the 10 % level',
  );
});

test('regionCell: the side most slopes are on, in steps from 60 % of the stations', () => {
  const cell = (negative: number) =>
    regionCell({ window: [1, 2], stations: 10, negative, falling: 0, rising: 0 }, 'sign');
  expect(cell(5)).toEqual({ sign: 0, tone: 0, marked: false });
  expect(cell(10)).toEqual({ sign: -1, tone: -4, marked: false });
  expect(cell(6).tone).toBe(-1);
  expect(cell(4)).toEqual({ sign: 1, tone: 1, marked: false });
});

test('regionCell: stations beyond chance, those that fall less those that rise', () => {
  const cell = (falling: number, rising: number) =>
    regionCell({ window: [1, 2], stations: 20, negative: 3, falling, rising }, 'significant');
  expect(cell(2, 2)).toEqual({ sign: 0, tone: 0, marked: false });
  expect(cell(3, 2).tone).toBe(-1);
  expect(cell(0, 8)).toEqual({ sign: 1, tone: 4, marked: false });
});
