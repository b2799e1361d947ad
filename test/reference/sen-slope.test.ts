import { test } from 'vitest';
import { senSlope } from '../../lib/statistics/sen-slope.ts';
import { expectReference, referenceCase, referenceCases } from './reference.ts';

type Input = { x: number[]; t: number[]; conf: number };

for (const reference of referenceCases<Input, object>('sen-slope')) {
  test(`senSlope gives slope, intercept and interval of ${reference.name}`, () => {
    const { x, t, conf } = reference.input;
    const { slope, intercept, low, high, pairs } = senSlope(t, x, { confidence: conf });
    expectReference(reference, {
      n_slopes: pairs,
      slope,
      intercept_median_residual: intercept,
      ci_interpolated: [low, high],
    });
  });
}

test('senSlope gives the slope of cloud seeding data (Hollander, Wolfe and Chicken, example 9.1)', () => {
  const reference = referenceCase<Input, object>(
    'published-examples',
    'Theil slope: Hollander, Wolfe and Chicken, example 9.1, cloud seeding',
  );
  expectReference(reference, { slope: senSlope(reference.input.t, reference.input.x).slope });
});
