import { expect, test } from 'vitest';
import { type NeedleFacts, needleOf, needleWords, sectorPath, sharedNeedle } from '@/app/components/needle';

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

test('sharedNeedle fills a ranked disc as far as its share goes, and leaves the others open', () => {
  expect(sharedNeedle(needleOf({ ...ranked, trend: 'falling', percentPerDecade: -5 }), 0.4).share).toBe(0.4);
  expect(sharedNeedle(needleOf(ranked), null).share).toBe(0);
  const drying = needleOf({ ...ranked, rank: null, drying: true, trend: 'falling', zeroDaysPerDecade: 5 });
  expect(sharedNeedle(drying, 0.4)).toEqual({ ...drying, significant: false });
});

test('sectorPath goes from the top clockwise, to the nearest eighth', () => {
  // a quarter ends at three o'clock, a half at six, three quarters at nine
  expect(sectorPath(0.25, 8)).toBe('M0 0V-8A8 8 0 0 1 8.000 -0.000Z');
  expect(sectorPath(0.5, 8)).toBe('M0 0V-8A8 8 0 0 1 0.000 8.000Z');
  expect(sectorPath(0.75, 8)).toBe('M0 0V-8A8 8 0 1 1 -8.000 0.000Z');
  expect(sectorPath(0.27, 8)).toBe(sectorPath(0.25, 8));
});

test('sectorPath is empty below half an eighth and a whole disc from fifteen sixteenths on, beyond its ends too', () => {
  expect([sectorPath(0, 8), sectorPath(0.06, 8), sectorPath(-1, 8)]).toEqual(['', '', '']);
  expect(sectorPath(0.94, 8)).toBe(sectorPath(1, 8));
  expect(sectorPath(2, 8)).toBe(sectorPath(1, 8));
});
