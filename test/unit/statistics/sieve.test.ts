import { expect, test } from 'vitest';
import { type SieveTerms, sieve, sieveResiduals, sieveTerms } from '../../../lib/statistics/sieve.ts';
import { seeded } from '../../seeded.ts';

const yearsFrom = (first: number, count: number) => Array.from({ length: count }, (_, i) => first + i);

/** A first-order autoregression with normal innovations, Box & Muller 1958. */
function autoregression(seed: number, count: number, r: number): number[] {
  const random = seeded(seed);
  let e = 0;
  return Array.from({ length: count }, () => {
    e = r * e + Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
    return e;
  });
}

function allOf(
  terms: SieveTerms,
  series: { years: number[]; residuals: ArrayLike<number> },
  label = 'A1',
  count = 400,
) {
  const replicates = sieve(terms, 'seed', count).of(series, label);
  if (replicates === null) throw new Error('no replicates');
  return Array.from({ length: count }, () => {
    const out = new Float64Array(replicates.length);
    replicates.next(out);
    return out;
  });
}

const mean = (x: ArrayLike<number>) => Array.from(x).reduce((sum, each) => sum + each, 0) / x.length;

test('sieveResiduals takes the slope out and leaves residuals about 0', () => {
  // 1, 4, 5 less 2 a year: 1, 2, -1 with mean 2/3
  const rest = sieveResiduals({ years: [2000, 2001, 2003], values: [1, 4, 5], slope: 2 });
  expect(Array.from(rest)).toEqual([1 - 2 / 3, 2 - 2 / 3, -1 - 2 / 3]);
  expect(() => sieveResiduals({ years: [2000], values: [], slope: 0 })).toThrow('same length, got 1 and 0');
  expect(() => sieveResiduals({ years: [2000, 2001], values: [1, Infinity], slope: 0 })).toThrow(
    'got Infinity in 2001',
  );
});

test('sieveTerms draws from the years that follow on a year of the same series', () => {
  const terms = sieveTerms([[2000, 2001, 2003], [2003, 2004], [1998]], Number.NaN);
  expect(terms).toMatchObject({ r: 0, firstYear: 1998, lastYear: 2004 });
  expect(Array.from(terms.sourceYears)).toEqual([2001, 2004]);
  expect(() => sieveTerms([], 0)).toThrow('no year');
  expect(() => sieveTerms([[2000]], 1)).toThrow('sieveTerms: r must lie in 0..1, got 1');
  expect(() => sieveTerms([[2000]], -0.1)).toThrow(RangeError);
});

test('without carry-over a replicate is made of the innovations alone, centred and stretched by √(m/(m − 2))', () => {
  const years = yearsFrom(2000, 5);
  const residuals = [9, 1, -1, 3, -3];
  const stretched = [1, -1, 3, -3].map((u) => u * Math.sqrt(4 / 2));
  const drawn = new Set(allOf(sieveTerms([years], 0), { years, residuals }).flatMap((out) => Array.from(out)));
  expect([...drawn].sort((a, b) => a - b)).toEqual(stretched.sort((a, b) => a - b));
});

test('replicates scatter and carry over as the autoregression they are made of', () => {
  const years = yearsFrom(1900, 120);
  const r = 0.5;
  const replicates = allOf(sieveTerms([years], r), { years, residuals: autoregression(3, 120, r) });
  const variance = mean(replicates.map((e) => mean(e.map((value) => value ** 2))));
  const lag1 = mean(replicates.map((e) => mean(e.subarray(1).map((value, i) => value * e[i])))) / variance;
  // stationary: variance of the innovations (here about 1) over 1 − r²
  expect(variance).toBeGreaterThan(0.75 / (1 - r * r));
  expect(variance).toBeLessThan(1.25 / (1 - r * r));
  expect(Math.abs(lag1 - r)).toBeLessThan(0.03);
});

test('series that share their innovations share them in every replicate, and gaps stay gaps', () => {
  const full = yearsFrom(1980, 40);
  const gappy = full.filter((year) => year % 7 !== 0 && year > 1990);
  const common = autoregression(5, 40, 0.3);
  const terms = sieveTerms([full, gappy], 0.3);
  const whole = allOf(terms, { years: full, residuals: common }, 'A');
  const part = allOf(terms, { years: gappy, residuals: gappy.map((year) => common[year - 1980]) }, 'B');
  const first = gappy[0] - 1980;
  expect(part[0]).toHaveLength(40 - first);
  const pairs: [number, number][] = [];
  part.forEach((out, b) => {
    out.forEach((value, place) => {
      expect(Number.isNaN(value)).toBe(!gappy.includes(gappy[0] + place));
      if (!Number.isNaN(value)) pairs.push([value, whole[b][first + place]]);
    });
  });
  const product = mean(pairs.map(([a, b]) => a * b));
  const spread = Math.sqrt(mean(pairs.map(([a]) => a * a)) * mean(pairs.map(([, b]) => b * b)));
  // of the years drawn, those in which the second too has an innovation; in the others it draws for itself
  const shared = gappy.filter((year) => gappy.includes(year - 1)).length / terms.sourceYears.length;
  expect(Math.abs(product / spread - shared)).toBeLessThan(0.08);
});

test('a replicate depends on the seed and the label, and not on what else is asked', () => {
  const years = yearsFrom(1980, 30).filter((year) => year !== 1990);
  const residuals = autoregression(7, years.length, 0.2);
  const terms = sieveTerms([yearsFrom(1975, 40), years], 0.2);
  const alone = sieve(terms, 'seed', 3).of({ years, residuals }, 'B');
  const shared = sieve(terms, 'seed', 3);
  shared.of({ years, residuals }, 'A')?.next(new Float64Array(30));
  const beside = shared.of({ years, residuals }, 'B');
  const other = sieve(terms, 'another', 3).of({ years, residuals }, 'B');
  const [a, b, c] = [alone, beside, other].map((each) => {
    const out = new Float64Array(30);
    each?.next(out);
    return out;
  });
  expect(b).toEqual(a);
  expect(c).not.toEqual(a);
});

test('a series with fewer than three innovations has no replicates; wrong calls are refused', () => {
  const terms = sieveTerms([yearsFrom(2000, 10)], 0.1);
  const made = sieve(terms, 'seed', 1);
  expect(made.of({ years: [2000, 2001, 2002, 2005], residuals: [0, 1, 2, 3] }, 'A')).toBeNull();
  expect(
    sieve(sieveTerms([[2000, 2002]], 0), 'seed', 1).of({ years: [2000, 2002], residuals: [1, 2] }, 'A'),
  ).toBeNull();
  expect(() => made.of({ years: [2000], residuals: [] }, 'A')).toThrow('same length, got 1 and 0');
  expect(() => made.of({ years: [1999], residuals: [1] }, 'A')).toThrow('within 2000..2009, got 1999');
  expect(() => made.of({ years: [2001, 2000], residuals: [1, 1] }, 'A')).toThrow('got 2000 at place 1');
  expect(() => made.of({ years: [2000], residuals: [Number.NaN] }, 'A')).toThrow('got NaN');
  expect(() => sieve(terms, 'seed', 0)).toThrow('replicates must be a whole number of at least 1, got 0');
  const replicates = made.of({ years: yearsFrom(2000, 10), residuals: new Float64Array(10) }, 'A');
  replicates?.next(new Float64Array(10));
  expect(() => replicates?.next(new Float64Array(10))).toThrow('all replicates were taken');
});
