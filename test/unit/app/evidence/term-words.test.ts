import { expect, test } from 'vitest';
import { movementWords, termsSentence } from '@/app/regions/[region]/evidence/_terms/term-words';
import type { Alternative, Movement } from '@/lib/region/window-types';

const MOVE: Movement = {
  code: 'A',
  name: 'Upper Alder',
  before: 15,
  after: 3,
  moved: 12,
  trendBefore: 'none',
  trendAfter: 'falling',
};
const at = (keys: Partial<Alternative>): Alternative => ({
  ...{ term: 'days', label: '7-day minima', change: {}, current: false, ranked: 30, falling: 10, rising: 1 },
  ...{ tau: 0.9, movedFar: 2, furthest: MOVE, problem: null },
  ...keys,
});

test('movementWords: which way a station moved and from where to where', () => {
  expect(movementWords(MOVE)).toBe('Upper Alder, up 12 places: 15 here, 3 there');
  expect(movementWords({ ...MOVE, before: 3, after: 4, moved: -1 })).toBe('Upper Alder, down 1 place: 3 here, 4 there');
  expect(movementWords({ ...MOVE, before: 3, after: 3, moved: 0 })).toBe('Upper Alder: 3 here, 3 there');
});

test('movementWords: the bare places are left out where stations that come or go blur them', () => {
  expect(movementWords({ ...MOVE, before: 13, after: 13, moved: -5 })).toBe(
    'Upper Alder, down 5 places among those ranked on both',
  );
});

test('movementWords: a station ranked in one only', () => {
  expect(movementWords({ ...MOVE, before: null, moved: null })).toBe('Upper Alder: not ranked here, 3 there');
  expect(movementWords({ ...MOVE, after: null, moved: null }, { before: 'there', after: 'here' })).toBe(
    'Upper Alder: 15 there, not ranked here',
  );
});

test('termsSentence: the fewest and the most that fall, those here, and where the order changes most', () => {
  const sentence = termsSentence([
    at({ current: true }),
    at({ label: '30-day minima', ranked: 20, falling: 2, tau: 0.5, movedFar: 7 }),
    at({ label: 'calendar years', ranked: 30, falling: 15 }),
    at({ label: 'May–October', problem: 'it cannot be' }),
  ]);
  expect(sentence).toBe(
    'On 2 other choices of one term between 2 of 20 (30-day minima) and 15 of 30 (calendar years) fall, 10 of 30 on these, after allowing for false discoveries; the order changes most under 30-day minima: 7 stations move by more than a tenth of the places.',
  );
});

test('termsSentence: choices that leave fewer than half of the stations do not speak, just half does', () => {
  const sentence = termsSentence([
    at({ current: true }),
    at({ label: '60-day minima', ranked: 14, falling: 14 }),
    at({ label: '30-day minima', ranked: 15, falling: 3, movedFar: 0 }),
  ]);
  expect(sentence).toBe(
    'On 1 other choice of one term that keeps at least half of the stations 3 of 15 fall (30-day minima), 10 of 30 on these, after allowing for false discoveries; the order of the stations hardly changes.',
  );
});

test('termsSentence: choices that all say the same are told once', () => {
  const alike = [
    at({ current: true, ranked: 1, falling: 0 }),
    at({ ranked: 1, falling: 0 }),
    at({ ranked: 1, falling: 0 }),
  ];
  expect(termsSentence(alike)).toMatch(/^On 2 other choices of one term 0 of 1 fall on each, 0 of 1 on these, /);
});

test('termsSentence: nothing to say without another choice', () => {
  expect(termsSentence([at({ current: true })])).toBeNull();
  expect(termsSentence([at({ current: true, ranked: 0 }), at({ ranked: 0 })])).toBeNull();
});
