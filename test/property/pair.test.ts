import fc from 'fast-check';
import { expect, test } from 'vitest';
import { comparePair, type PairSite, type PairTerms } from '../../lib/region/pair.ts';
import { antecedentSum } from '../../lib/series/antecedent-sum.ts';
import { lowess } from '../../lib/statistics/lowess.ts';
import { rankCorrelation } from '../../lib/statistics/rank-correlation.ts';

const whole = fc.integer({ min: -20, max: 20 });
const points = fc.array(fc.record({ x: whole, y: whole }), { minLength: 3, maxLength: 30 });
const spans = fc.double({ min: 0.2, max: 1, noNaN: true });

const near = (got: number, wanted: number, scale: number) =>
  expect(Math.abs(got - wanted), `${got} for ${wanted}`).toBeLessThanOrEqual(1e-7 * (1 + Math.abs(scale)));

test('lowess runs along any line, with outliers or not, whatever the span', () => {
  fc.assert(
    fc.property(points, spans, whole, whole, (given, span, a, b) => {
      const x = given.map((point) => point.x);
      const y = x.map((each) => a * each + b);
      const largest = y.reduce((most, each) => Math.max(most, Math.abs(each)), 0);
      lowess(x, y, { span }).forEach((fitted, i) => {
        near(fitted, y[i], largest);
      });
    }),
  );
});

test('lowess without rounds goes along when y is stretched, turned over or lifted, and when x is moved', () => {
  fc.assert(
    fc.property(points, spans, fc.integer({ min: -5, max: 5 }), whole, (given, span, a, b) => {
      const [x, y] = [given.map((point) => point.x), given.map((point) => point.y)];
      const curve = lowess(x, y, { span, rounds: 0 });
      const moved = lowess(
        x.map((each) => each + b),
        y.map((each) => a * each + b),
        { span, rounds: 0 },
      );
      moved.forEach((fitted, i) => {
        near(fitted, a * curve[i] + b, 200);
      });
    }),
  );
});

test('lowess gives equal points equal values, and is a number everywhere', () => {
  fc.assert(
    fc.property(points, spans, (given, span) => {
      const twice = [...given, ...given];
      const curve = lowess(
        twice.map(({ x }) => x),
        twice.map(({ y }) => y),
        { span },
      );
      curve.forEach((fitted, i) => {
        expect(fitted).not.toBeNaN();
        near(fitted, curve[(i + given.length) % twice.length], 20);
      });
    }),
  );
});

test('rankCorrelation lies in −1..1, is the same both ways round, and turns over with one of the two', () => {
  fc.assert(
    fc.property(points, (given) => {
      const [x, y] = [given.map((point) => point.x), given.map((point) => point.y)];
      const r = rankCorrelation(x, y);
      if (Number.isNaN(r)) return;
      expect(Math.abs(r)).toBeLessThanOrEqual(1 + 1e-12);
      expect(rankCorrelation(y, x)).toBeCloseTo(r, 12);
      const turned = rankCorrelation(
        x.map((each) => -each),
        y,
      );
      expect(turned).toBeCloseTo(-r, 12);
    }),
  );
});

test('antecedentSum of neighbouring stretches adds up, where no day is missing', () => {
  const depths = fc.array(fc.integer({ min: 0, max: 50 }), { minLength: 2, maxLength: 60 });
  fc.assert(
    fc.property(depths, fc.nat(), fc.nat(), (values, a, b) => {
      const series = { firstDay: 100, values: Float64Array.from(values) };
      const last = 100 + values.length - 1;
      const late = 1 + (a % (values.length - 1));
      const early = 1 + (b % (values.length - late));
      const whole = antecedentSum(series, last, late + early);
      expect(antecedentSum(series, last, late) + antecedentSum(series, last - late, early)).toBeCloseTo(whole, 9);
    }),
  );
});

const TERMS: PairTerms = { index: 'minimum', days: 7, period: null, serialCorrection: 'none', alpha: 0.1 };
const figures = fc.array(fc.integer({ min: 1, max: 1000 }), { minLength: 3, maxLength: 25 });
const site = (code: string, values: readonly number[]): PairSite => ({
  ...{ code, name: code, river: '', influence: 'natural', drying: false },
  years: values.map((_, i) => 2000 + i),
  values: [...values],
});

test('comparePair does not depend on units nor on the order of references, and its sums end level', () => {
  fc.assert(
    fc.property(figures, figures, figures, fc.integer({ min: 1, max: 9 }), (a, b, c, scale) => {
      const years = Math.min(a.length, b.length, c.length);
      const plain = comparePair(site('A', a), [site('B', b), site('C', c)], TERMS, '');
      const other = comparePair(
        site(
          'A',
          a.map((value) => value / scale),
        ),
        [
          site(
            'C',
            c.map((value) => value * scale),
          ),
          site('B', b),
        ],
        TERMS,
        '',
      );
      expect(plain.years).toHaveLength(years);
      plain.years.forEach(({ ratio }, i) => {
        expect(other.years[i].ratio).toBeCloseTo(ratio, 9);
      });
      const { stationSum, referenceSum } = plain.years[years - 1];
      expect(stationSum).toBeCloseTo(years, 9);
      expect(referenceSum).toBeCloseTo(years, 9);
    }),
    { numRuns: 30 },
  );
});
