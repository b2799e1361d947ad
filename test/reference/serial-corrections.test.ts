import { expect, test } from 'vitest';
import { trendFamily } from '../../lib/region/trend-family.ts';
import { allLagsVarianceFactor } from '../../lib/statistics/all-lags.ts';
import { mannKendall } from '../../lib/statistics/mann-kendall.ts';
import { preWhitened, significantLag1 } from '../../lib/statistics/pre-whitening.ts';
import { senSlope } from '../../lib/statistics/sen-slope.ts';
import { expectReference, referenceCases } from './reference.ts';

/** The figures take t = 1..n; the last case of the loop below shows that calendar years change nothing. */
const dated = (values: number[], first = 1) => {
  const years = values.map((_, i) => first + i);
  return { years, values, slope: senSlope(years, values).slope };
};

for (const reference of referenceCases<{ x: number[] }, { lags_used: number[] }>('all-lags')) {
  test(`allLagsVarianceFactor gives the lags and factor, and the test its z and p, of ${reference.name}`, () => {
    const series = dated(reference.input.x);
    const { factor, lags } = allLagsVarianceFactor(series);
    const { n, variance, z, p } = mannKendall(series.values, { varianceFactor: factor });
    expect(lags).toEqual(reference.expected.lags_used);
    const { slope } = series;
    expectReference(reference, { n, slope, correction: factor, var_S_corrected: factor * variance, z, p });
    expect(allLagsVarianceFactor(dated(reference.input.x, 1871)).lags).toEqual(lags);
  });

  test(`trendFamily all-lags tests ${reference.name} so`, () => {
    const [{ z, p, serialFactor, slope }] = trendFamily([dated(reference.input.x)], 'all-lags');
    expectReference(reference, { z, p, slope, correction: serialFactor });
  });
}

type Whitened = { r1: number; prewhitened: boolean; first_values: number[]; last_value: number };

for (const reference of referenceCases<{ x: number[] }, Whitened>('pre-whitening')) {
  const { expected } = reference;

  test(`significantLag1 and preWhitened give r1 and the whitened values of ${reference.name}`, () => {
    const series = dated(reference.input.x);
    const r1 = significantLag1(series);
    if (!expected.prewhitened) {
      expect(r1).toBeNaN();
      expect(expected.r1).toBeGreaterThan(0);
      return;
    }
    expectReference(reference, { r1 });
    const { values, years } = preWhitened(series, r1);
    expect(years[0]).toBe(2);
    // time counts from 0 here and from 1 there, which moves all values by r1·slope; they are rounded to 9 decimals
    const level = r1 * series.slope;
    values.slice(0, 5).forEach((value, i) => {
      expect(value + level).toBeCloseTo(expected.first_values[i], 7);
    });
    expect(values[values.length - 1] + level).toBeCloseTo(expected.last_value, 7);
  });

  test(`trendFamily pre-whitened tests ${reference.name} so, and leaves slope and tau to the values as they are`, () => {
    const series = dated(reference.input.x);
    const [{ z, p, slope, tau, r1, serialFactor, low }] = trendFamily([series], 'pre-whitened');
    expectReference(reference, { z, p, slope });
    expect(tau).toBe(mannKendall(series.values).tauB);
    expect(low).toBe(senSlope(series.years, series.values).low);
    expect(serialFactor).toBe(1);
    expect(Number.isNaN(r1)).toBe(!expected.prewhitened);
  });
}
