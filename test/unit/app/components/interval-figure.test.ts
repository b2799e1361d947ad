import { expect, test } from 'vitest';
import { intervalScale } from '@/app/components/interval-figure';
import { axisTicks } from '@/app/regions/[region]/_ranking/figure-words';

test('intervalScale always holds 0 and every end of a short list', () => {
  const { low, high } = intervalScale([-12, -3, null, -8, -1]);
  expect(low).toBeLessThan(-12);
  expect(high).toBeGreaterThan(0);
  expect(intervalScale([3, 9]).low).toBeLessThan(0);
});

test('intervalScale lets the outer hundredth of many ends run off', () => {
  const ends = Array.from({ length: 200 }, (_, i) => (i - 100) / 10);
  const { low, high } = intervalScale([...ends, -500, 500]);
  expect(low).toBeGreaterThan(-12);
  expect(high).toBeLessThan(12);
});

test('intervalScale lets one river run off that would flatten the few others to points', () => {
  const { low, high } = intervalScale([-49, 14, -21, 7, -56, 26, 900, 2400]);
  expect(low).toBeLessThan(-56);
  expect(high).toBeLessThan(450);
  expect(intervalScale([0, 0, 0, 5]).high).toBeGreaterThan(5);
});

test('intervalScale has width without any interval', () => {
  expect(intervalScale([null, Number.NaN])).toEqual({ low: -1, high: 1 });
});

test('axisTicks are round, hold 0, and leave out what would be written over it', () => {
  expect(axisTicks({ low: -23, high: 12 })).toEqual([-20, 0, 10]);
  expect(axisTicks({ low: -23, high: 3 })).toEqual([-20, 0]);
  expect(axisTicks({ low: -0.7, high: 0.6 })).toEqual([-0.5, 0, 0.5]);
});
