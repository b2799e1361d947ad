import { describe, expect, test } from 'vitest';
import { type WeatherInput, type WeatherTerms, weatherTrend } from '../../../lib/region/weather-trend.ts';
import { lowess } from '../../../lib/statistics/lowess.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { seeded } from '../../seeded.ts';

const TERMS: WeatherTerms = { days: 7, period: [1981, 2020], serialCorrection: 'none', alpha: 0.1 };
const YEARS = 40;

/** Forty years of 365 days with the minimum on day 250 of each. */
const LENGTH = 365;
const dayOf = (i: number) => i * LENGTH + 250;

/** Standard normal, by Box and Muller. */
const normals = (seed: number) => {
  const random = seeded(seed);
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
};

/** A record in which the 100 days before each minimum have a depth, all the same on each of its days.
 *  @param depths  mm in these 100 days, one a year */
function record(depths: readonly number[]): WeatherInput['weather'] {
  const values = new Float64Array(YEARS * LENGTH).fill(2);
  depths.forEach((depth, i) => {
    values.fill(depth / 100, dayOf(i) - 99, dayOf(i) + 1);
  });
  return { firstDay: 0, values };
}

const input = (minima: number[], depths: readonly number[], more: Partial<WeatherInput> = {}): WeatherInput => ({
  station: { code: 'A', name: 'A at Ford' },
  minima: { years: minima.map((_, i) => 1981 + i), minima, days: minima.map((_, i) => dayOf(i)) },
  quantity: 'rainfall',
  from: { code: 'A', name: 'A at Ford' },
  weather: record(depths),
  antecedentDays: 100,
  ...more,
});

/** Wet years leave more water, ever less of it the wetter they are. */
const usual = (depth: number) => 4 * (1 - Math.exp(-depth / 150));

const normal = normals(5);
const DEPTHS = Array.from({ length: YEARS }, () => 200 + 60 * normal());
const NOISE = DEPTHS.map(() => 0.1 * normal());

describe('weatherTrend', () => {
  test('finds a loss that the weather hides, and gives its size', () => {
    const minima = DEPTHS.map((depth, i) => usual(depth) + NOISE[i] - 0.006 * i);
    const trend = weatherTrend(input(minima, DEPTHS), TERMS, '');
    expect(trend.plain?.p).toBeGreaterThan(0.05);
    expect(trend.adjusted?.p).toBeLessThan(0.001);
    expect(trend.adjusted?.slopePerDecade).toBeCloseTo(-0.06, 1);
    expect(trend.adjusted?.low).toBeLessThan(-0.06);
    expect(trend.adjusted?.high).toBeGreaterThan(-0.06);
    expect(trend.correlation).toBeGreaterThan(0.8);
    // the rain before the hundred days is the same in all years
    expect(trend.choices.map(({ antecedentDays }) => antecedentDays)).toEqual([30, 90, 180, 270, 365]);
    for (const { correlation } of trend.choices.slice(0, 3))
      expect(correlation).toBeCloseTo(trend.correlation ?? 0, 10);
    expect(trend.sentence).toMatch(
      /^Given the rainfall of the 100 days before, the 7-day minimum of A at Ford lost .* % of its mean per decade \(95 % interval −.*; p below 0\.001\), 1981–2020, 40 years\. As it is, it changed by −/,
    );
  });

  test('leaves nothing of a fall that the weather explains, and says that the weather fell', () => {
    const depths = DEPTHS.map((depth, i) => depth - 4 * i);
    const minima = depths.map((depth, i) => usual(depth) + NOISE[i]);
    const trend = weatherTrend(input(minima, depths), TERMS, '');
    expect(trend.plain?.p).toBeLessThan(0.01);
    expect(trend.adjusted?.p).toBeGreaterThan(0.1);
    expect(trend.detectable).toBeGreaterThan(0);
    expect(trend.sentence).toMatch(
      /no significant trend is left.*would have shown .* in four cases of five\. This does not show that nothing changed\.$/,
    );
    expect(trend.warnings.join()).toMatch(/^The rainfall itself fell \(p .*understates one \(Alley 1988\)\.$/);
  });

  test('is the test and slope of what the minima lie above the curve', () => {
    const minima = DEPTHS.map((depth, i) => usual(depth) + NOISE[i] - 0.02 * i);
    const trend = weatherTrend(input(minima, DEPTHS), TERMS, '');
    const sums = trend.years.map(({ weather }) => weather);
    sums.forEach((sum, i) => {
      expect(sum).toBeCloseTo(DEPTHS[i], 8);
    });
    const curve = lowess(sums, minima);
    const residuals = minima.map((minimum, i) => minimum - curve[i]);
    expect(trend.years.map(({ residual }) => residual)).toEqual(residuals);
    const years = trend.years.map(({ year }) => year);
    expect(trend.adjusted).toMatchObject({
      slopePerDecade: senSlope(years, residuals).slope * 10,
      p: mannKendall(residuals).p,
    });
  });

  test('evaporation works the other way round, and another station is named', () => {
    const minima = DEPTHS.map((depth, i) => 5 - usual(depth) + NOISE[i]);
    const elsewhere = { quantity: 'potential-evaporation', from: { code: 'B', name: 'B at Hill' } } as const;
    const trend = weatherTrend(input(minima, DEPTHS, elsewhere), TERMS, '');
    expect(trend.correlation).toBeLessThan(-0.8);
    expect(trend.sentence).toMatch(/^Given the potential evaporation of the 100 days before at B at Hill, /);
  });

  test('says so when the weather explains nothing', () => {
    const minima = DEPTHS.map(() => 3 + normal());
    const { warnings } = weatherTrend(input(minima, DEPTHS), TERMS, '');
    expect(warnings.join()).toMatch(/explains little of the minima/);
  });

  test('leaves out the years whose weather is not known, and counts them', () => {
    const weather = record(DEPTHS);
    weather.values.fill(Number.NaN, dayOf(3) - 50, dayOf(3) - 40);
    weather.values.fill(Number.NaN, 0, dayOf(1));
    const minima = DEPTHS.map((depth, i) => usual(depth) + NOISE[i]);
    const trend = weatherTrend(input(minima, DEPTHS, { weather }), TERMS, '');
    expect(trend.years.map(({ year }) => year).slice(0, 3)).toEqual([1983, 1985, 1986]);
    expect(trend.warnings).toContain('3 usable years without enough rainfall before the minimum: left out.');
  });

  test('false alarms stay near the nominal 5 % where the weather trends and the river does not react to more', () => {
    // spares the simulation of what could have been found
    const ALWAYS_FOUND = { ...TERMS, alpha: 0.9999 };
    let alarms = 0;
    const cases = 250;
    for (let seed = 1; seed <= cases; seed++) {
      const draw = normals(seed);
      const depths = Array.from({ length: YEARS }, (_, i) => Math.max(20, 260 - 2 * i + 60 * draw()));
      const minima = depths.map((depth) => usual(depth) + 0.2 * draw());
      const { adjusted } = weatherTrend(input(minima, depths), ALWAYS_FOUND, '');
      if ((adjusted?.p ?? 1) < 0.05) alarms += 1;
    }
    // 5 % ± 3 standard errors above; below it may fall, for the curve takes part of chance trends with it
    expect(alarms / cases).toBeLessThan(0.09);
    expect(alarms / cases).toBeGreaterThan(0.005);
  });
});

describe('weatherTrend refuses in words', () => {
  test('fewer than ten years with weather', () => {
    const weather = record(DEPTHS);
    weather.values.fill(Number.NaN, dayOf(8) + 1);
    const minima = DEPTHS.map((depth) => usual(depth));
    const trend = weatherTrend(input(minima, DEPTHS, { weather }), TERMS, '');
    expect(trend).toMatchObject({ years: [], plain: null, adjusted: null, weather: null });
    expect(trend.problem).toBe(
      '9 of 40 usable years of 1981–2020 have the rainfall of the 100 days before the minimum at A at Ford; 10 are needed. Choose other weather, or other years in the basis.',
    );
    weather.values.fill(1, dayOf(8) + 1, dayOf(9) + 1);
    expect(weatherTrend(input(minima, DEPTHS, { weather }), TERMS, '').problem).toBeNull();
  });

  test('minima or weather that never vary', () => {
    const level = new Array<number>(YEARS).fill(1);
    expect(weatherTrend(input(level, DEPTHS), TERMS, '').problem).toMatch(/^All 7-day minima are equal/);
    expect(weatherTrend(input(NOISE, level), TERMS, '').problem).toMatch(/^The rainfall before the minima is the same/);
  });

  test('wrong calls', () => {
    expect(() => weatherTrend(input(NOISE, DEPTHS, { antecedentDays: 0 }), TERMS, '')).toThrow(RangeError);
    const minima = { years: [1981, 1982], minima: [1], days: [100, 465] };
    expect(() => weatherTrend(input(NOISE, DEPTHS, { minima }), TERMS, '')).toThrow(
      'weatherTrend: years, minima and days must have the same length, got 2, 1 and 2',
    );
  });
});
