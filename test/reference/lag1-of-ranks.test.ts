import { expect, test } from 'vitest';
import { senSlope } from '../../lib/statistics/sen-slope.ts';
import { lag1OfRanks } from '../../lib/statistics/serial-correlation.ts';
import { expectReference, referenceCases } from './reference.ts';

for (const reference of referenceCases<{ x: number[] }, { n: number }>('lag1-of-ranks')) {
  test(`lag1OfRanks, its bias put back, gives the first rank autocorrelation of ${reference.name}`, () => {
    const values = reference.input.x;
    const years = values.map((_, i) => i + 1);
    const { slope } = senSlope(years, values);
    const { n } = reference.expected;
    expect(values).toHaveLength(n);
    const biasFree = lag1OfRanks({ years, values, slope });
    // undo (n·r + 1)/(n − 4); a full series has n − 1 pairs, so n/(pairs + 1) is 1
    expectReference(reference, { slope, rho_1: (biasFree * (n - 4) - 1) / n });
  });
}
