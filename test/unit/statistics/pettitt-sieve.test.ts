import { expect, test } from 'vitest';
import { normalQuantile } from '../../../lib/statistics/normal.ts';
import { pettitt } from '../../../lib/statistics/pettitt.ts';
import { pettittSieveP } from '../../../lib/statistics/pettitt-sieve.ts';
import { randomStream } from '../../../lib/statistics/random.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';

const YEARS = Array.from({ length: 40 }, (_, i) => 1980 + i);

/** First-order autoregressive normal values without any change. */
function carriedOver(r1: number, round: number): number[] {
  const random = randomStream('pettitt-sieve', 'series', round);
  let e = 0;
  return Array.from({ length: 30 + YEARS.length }, () => {
    e = r1 * e + normalQuantile(random.uniform() || 0.5);
    return e;
  }).slice(30);
}

test('pettittSieveP: at a lag-1 correlation of 0.5 it holds its level, where the approximation does not', () => {
  const series = 120;
  let [bySieve, byFormula] = [0, 0];
  for (let round = 0; round < series; round++) {
    const values = carriedOver(0.5, round);
    const { slope } = senSlope(YEARS, values);
    const seed = `draws ${round}`;
    if (pettittSieveP({ years: YEARS, values, slope }, { r1: 0.5, seed, replicates: 99 }) <= 0.05) bySieve++;
    if (pettitt(values).p <= 0.05) byFormula++;
  }
  // binomial: in 99.5 of 100 tries 120 series give at most 13 at a true 5 %, and at least 23 at the formula's 29 % (4,000
  // such series)
  expect(byFormula).toBeGreaterThanOrEqual(23);
  expect(bySieve).toBeLessThanOrEqual(13);
  expect(bySieve).toBeGreaterThan(0);
}, 30_000);

test('pettittSieveP: a clear step has the smallest p there is', () => {
  const values = carriedOver(0, 1).map((value, i) => value + (i < 20 ? 0 : 8));
  const { slope } = senSlope(YEARS, values);
  const options = { r1: 0.2, seed: 'step', replicates: 199 };
  expect(pettittSieveP({ years: YEARS, values, slope }, options)).toBe(1 / 200);
});

test('pettittSieveP: the same seed gives the same p, whatever was drawn before from others', () => {
  const values = carriedOver(0.3, 2);
  const series = { years: YEARS, values, slope: 0 };
  const draw = () => pettittSieveP(series, { r1: 0.3, seed: 'same', replicates: 99 });
  const first = draw();
  randomStream('other').uniform();
  expect(draw()).toBe(first);
});

test('pettittSieveP: fewer than 3 pairs of consecutive years have no answer', () => {
  const years = [1980, 1982, 1984, 1986, 1987, 1989, 1990];
  const values = [1, 2, 1, 3, 2, 4, 1];
  expect(pettittSieveP({ years, values, slope: 0 }, { r1: 0.3, seed: 'few', replicates: 9 })).toBeNaN();
  expect(pettittSieveP({ years: [], values: [], slope: 0 }, { r1: 0.3, seed: 'none' })).toBeNaN();
});

test('pettittSieveP: refuses what it cannot use, by name', () => {
  const series = { years: YEARS, values: carriedOver(0, 3), slope: 0 };
  const seed = 'bad';
  expect(() => pettittSieveP(series, { r1: 1, seed })).toThrow('pettittSieveP: r1 must lie in 0..1');
  expect(() => pettittSieveP(series, { r1: Number.NaN, seed })).toThrow('pettittSieveP: r1');
  expect(() => pettittSieveP(series, { r1: 0, seed, replicates: 0 })).toThrow('sieve: replicates');
  const infinite = { ...series, values: series.values.with(3, Number.POSITIVE_INFINITY) };
  expect(() => pettittSieveP(infinite, { r1: 0, seed })).toThrow('sieveResiduals: value and slope must be finite');
});
