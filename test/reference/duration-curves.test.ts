import { expect, test } from 'vitest';
import { durationCurve, exceedanceOfRank, flowAtExceedance } from '../../lib/curves/duration-curve.ts';
import { meanAndMedian } from '../../lib/curves/station-curve.ts';
import { expectReference, referenceCases } from './reference.ts';

interface Input {
  x: number[];
  percent_exceeded?: number[];
  descending_rank?: number[];
}

for (const reference of referenceCases<Input, object>('duration-curves')) {
  test(`durationCurve gives the ${reference.name}`, () => {
    const curve = durationCurve(Float64Array.from(reference.input.x));
    const { percent_exceeded: percents, descending_rank: ranks } = reference.input;
    expect(percents ?? ranks).toBeDefined();
    if (percents) {
      expectReference(reference, {
        n: curve.n,
        mean: meanAndMedian(curve).mean,
        weibull: percents.map((each) => flowAtExceedance(curve, each / 100)),
      });
    }
    if (ranks) {
      expectReference(reference, {
        flow: ranks.map((rank) => curve.sorted[rank - 1]),
        percent_exceeded_weibull: ranks.map((rank) => 100 * exceedanceOfRank(rank, curve.n)),
      });
    }
  });
}
