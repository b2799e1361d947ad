import { expect, test } from 'vitest';
import { type NeedleFacts, needleOf, needleWords } from '@/app/components/needle';

const ranked: NeedleFacts = {
  rank: 1,
  drying: false,
  trend: 'none',
  percentPerDecade: 0,
  tau: 0,
  zeroDaysPerDecade: null,
};
const degrees = (facts: Partial<NeedleFacts>) => (needleOf({ ...ranked, ...facts }).angle * 180) / Math.PI;

test('needleOf tilts down to the right when falling, 45° at 10 % per decade, and never passes the upright', () => {
  expect(degrees({ percentPerDecade: -10 })).toBeCloseTo(45, 10);
  expect(degrees({ percentPerDecade: 10 })).toBeCloseTo(-45, 10);
  expect(degrees({ percentPerDecade: -1000 })).toBeGreaterThan(80);
  expect(degrees({ percentPerDecade: -1000 })).toBeLessThan(90);
});

test('needleOf draws level what prints as 0.0', () => {
  expect(needleOf({ ...ranked, percentPerDecade: -0.049 })).toMatchObject({ side: 'level', angle: 0 });
  expect(needleOf({ ...ranked, percentPerDecade: -0.05 }).side).toBe('falling');
  expect(needleOf({ ...ranked, percentPerDecade: 0.05 }).side).toBe('rising');
});

test('needleOf is filled only for a significant trend', () => {
  expect(needleOf({ ...ranked, trend: 'falling', percentPerDecade: -5 }).significant).toBe(true);
  expect(needleOf({ ...ranked, trend: 'none', percentPerDecade: -50 }).significant).toBe(false);
});

test('needleOf falls back on tau where the mean minimum is 0', () => {
  expect(degrees({ percentPerDecade: null, tau: -0.5 })).toBeCloseTo(30, 10);
  expect(needleOf({ ...ranked, percentPerDecade: null, tau: -0.5 }).side).toBe('falling');
});

test('needleOf shows more days without flow the way a fall is shown, with a mark of its own', () => {
  const drying = needleOf({ ...ranked, rank: null, drying: true, trend: 'falling', zeroDaysPerDecade: 10 });
  expect(drying).toMatchObject({ kind: 'drying', side: 'falling', significant: true });
  expect((drying.angle * 180) / Math.PI).toBeCloseTo(45, 10);
  expect(needleWords(drying)).toBe('days without flow increasing, significant');
});

test('needleOf gives an unranked station neither tilt nor side', () => {
  const needle = needleOf({ ...ranked, rank: null, trend: null, percentPerDecade: -20 });
  expect(needle).toEqual({ kind: 'unranked', side: 'level', significant: false, angle: 0 });
  expect(needleWords(needle)).toBe('not ranked');
});

test('needleOf of days compared tilts by days, more zero-flow days as a fall, and says so', () => {
  const days = { percentPerDecade: null, trend: 'falling', trendOf: 'zero-flow-days', valueSlope: 10 } as const;
  expect(degrees(days)).toBeCloseTo(45, 10);
  const needle = needleOf({ ...ranked, ...days });
  expect(needle.side).toBe('falling');
  expect(needleWords(needle, 'zero-flow-days')).toBe('drying for longer, significant');
  expect(degrees({ ...days, trendOf: 'minimum-date', valueSlope: -10 })).toBeCloseTo(45, 10);
});

test('needleOf of deficits tilts growing ones as a fall', () => {
  const facts = { percentPerDecade: 10, trendOf: 'deficit' } as const;
  expect(degrees(facts)).toBeCloseTo(45, 10);
  expect(needleWords(needleOf({ ...ranked, ...facts }), 'deficit')).toBe('larger deficits, may be chance');
});
