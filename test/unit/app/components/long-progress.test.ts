import { expect, test } from 'vitest';
import { sharePassed } from '@/app/components/long-progress';

test('sharePassed: a job that waits for its turn has neither share nor time left', () => {
  expect(sharePassed(null, null, 5_000)).toEqual({ share: null, secondsLeft: null });
});

test('sharePassed: no time left is told before 3 % and 0.8 s have passed', () => {
  const since = { share: 0.1, at: 1_000 };
  expect(sharePassed(since, 0.12, 9_000).secondsLeft).toBeNull();
  expect(sharePassed(since, 0.5, 1_799).secondsLeft).toBeNull();
  expect(sharePassed(since, 0.5, 1_800).secondsLeft).not.toBeNull();
});

test('sharePassed: the pace is that since the following began, so that a job joined half-way is judged by what came after', () => {
  // from 50 % to 75 % in 10 s: the last 25 % take 10 s more
  const { share, secondsLeft } = sharePassed({ share: 0.5, at: 2_000 }, 0.75, 12_000);
  expect(share).toBe(0.75);
  expect(secondsLeft).toBeCloseTo(10, 9);
});

test('sharePassed: all done leaves nothing', () => {
  expect(sharePassed({ share: 0, at: 0 }, 1, 4_000).secondsLeft).toBe(0);
});
