import { expect, test } from 'vitest';
import { recordingStep } from '../../../lib/region/recording-step.ts';

test('recordingStep of 1-day minima is their greatest common measure', () => {
  expect(recordingStep([0.06, 0.04, 0.02], 1)).toBeCloseTo(0.02, 12);
  expect(recordingStep([0.06, 0.04, 0.03], 1)).toBeCloseTo(0.01, 12);
});

test('recordingStep finds the step behind n-day means that were rounded to ten digits', () => {
  const sums = [9, 13, 17, 26, 30, 41];
  const means = sums.map((sum) => Number(((sum * 0.001) / 7).toPrecision(10)));
  expect(recordingStep(means, 7)).toBeCloseTo(0.001, 10);
});

test('recordingStep is in m³/s whatever the unit was: hundredths of a cubic foot', () => {
  const step = 0.01 * 0.028316846592;
  const means = [14, 23, 35, 61, 80].map((sum) => Number(((sum * step) / 7).toPrecision(10)));
  expect(recordingStep(means, 7) / step).toBeCloseTo(1, 6);
});

test('recordingStep sees lows that held one flow for all n days: the step is not n times as large', () => {
  expect(recordingStep([5, 4, 3, 2, 1], 7)).toBeCloseTo(1, 9);
  expect(recordingStep([0.15, 0.1, 0.25], 30)).toBeCloseTo(0.05, 9);
  const cubicFoot = 0.028316846592;
  expect(
    recordingStep(
      [3, 5, 11].map((flow) => flow * cubicFoot),
      7,
    ) / cubicFoot,
  ).toBeCloseTo(1, 6);
});

test('recordingStep does not depend on zeros and repeats', () => {
  expect(recordingStep([0, 0.02, 0.02, 0, 0.05], 1)).toBeCloseTo(0.01, 12);
});

test('recordingStep of computed flows, one flow, zeros or nothing is NaN', () => {
  expect(recordingStep([3, 3, 0, 3], 7)).toBeNaN();
  expect(recordingStep([Math.PI, Math.E, Math.SQRT2, Math.LN2], 7)).toBeNaN();
  expect(recordingStep([0, 0], 7)).toBeNaN();
  expect(recordingStep([], 7)).toBeNaN();
});
