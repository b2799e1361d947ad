import { describe, expect, test } from 'vitest';
import {
  cellIndex,
  changesOf,
  type StartEndAnswer,
  stepsOf,
} from '@/app/regions/[region]/stations/[code]/_windows/start-end-answer';
import { steadinessWords } from '@/app/regions/[region]/stations/[code]/_windows/steadiness-words';

const answer: StartEndAnswer = {
  starts: [1980, 1981],
  ends: [1994, 1995, 1996],
  z: [0.1, 0.2, 0.3, null, 0.5, 0.6],
  p: [0.9, 0.8, 0.7, null, 0.6, 0.5],
  percentPerDecade: [1, 2, 44, null, 5, 6],
  slopePerDecade: [0.1, 0.2, 0.3, null, 0.5, 0.6],
  slopeUnit: 'm³/s',
  steadiness: 0.8,
  windows: 5,
};

describe('cellIndex', () => {
  test('goes by start, then end', () => {
    expect(answer.z[cellIndex(answer, [1980, 1996])]).toBe(0.3);
    expect(answer.z[cellIndex(answer, [1981, 1995])]).toBe(0.5);
  });
  test('is −1 outside the chart', () => {
    expect(cellIndex(answer, [1979, 1995])).toBe(-1);
    expect(cellIndex(answer, [1981, 1997])).toBe(-1);
  });
});

describe('changesOf', () => {
  test('are percentages where there is one, else slopes in their unit', () => {
    expect(changesOf(answer)).toEqual({ values: answer.percentPerDecade, unit: '%' });
    const dates = { ...answer, percentPerDecade: answer.z.map(() => null), slopeUnit: 'days' };
    expect(changesOf(dates)).toEqual({ values: answer.slopePerDecade, unit: 'days' });
  });
});

describe('stepsOf', () => {
  test('of Z are those of the normal distribution: 1, then two-sided 10, 5 and 1 %', () => {
    expect(stepsOf('z', [])).toEqual([1, 1.645, 1.96, 2.576]);
  });
  test('of changes end at half of the largest or below', () => {
    expect(stepsOf('change', answer.percentPerDecade)).toEqual([2, 5, 10, 20]);
    expect(stepsOf('change', [null])).toEqual([1, 2, 5, 10]);
  });
});

describe('steadinessWords', () => {
  test('counts the windows that agree, and says what they are not', () => {
    expect(steadinessWords({ steadiness: 0.8, windows: 5 })).toBe(
      'Steadiness 80\u00a0%: 4 of 5 windows of at least 15 usable years go the way of the whole period. Windows overlap, so they are not independent evidence.',
    );
  });
  test('says that a trend without a sign has none to agree with', () => {
    expect(steadinessWords({ steadiness: null, windows: 5 })).toMatch(/^The whole period goes neither way/);
  });
});
