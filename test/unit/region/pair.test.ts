import { describe, expect, test } from 'vitest';
import { comparePair, type PairSite, type PairTerms } from '../../../lib/region/pair.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { seeded } from '../../seeded.ts';

const TERMS: PairTerms = { index: 'minimum', days: 7, period: [1981, 2010], serialCorrection: 'none', alpha: 0.1 };

const site = (code: string, first: number, values: number[], more: Partial<PairSite> = {}): PairSite => ({
  ...{ code, name: `${code} at Ford`, river: code, influence: 'natural', drying: false },
  years: values.map((_, i) => first + i),
  values,
  ...more,
});

/** Thirty years of weather that all stations share. */
const random = seeded(11);
const WEATHER = Array.from({ length: 30 }, () => 0.5 + random());
const noisy = (scale: number, change: (i: number) => number = () => 1) =>
  WEATHER.map((weather, i) => scale * weather * change(i) * (1 + 0.04 * (random() - 0.5)));

describe('comparePair', () => {
  test('by hand: relative values, ratio, sums of the double-mass curve', () => {
    const result = comparePair(
      site('A', 2000, [1, 2, 3]),
      [site('B', 2000, [10, 10, 40]), site('C', 2000, [2, 6, 4])],
      { ...TERMS, period: null },
      '',
    );
    // means 2, 20, 4: the station is 0.5, 1, 1.5; the reference (0.5 + 0.5)/2, (0.5 + 1.5)/2, (2 + 1)/2
    expect(result.years).toEqual([
      { year: 2000, station: 1, reference: 0.5, ratio: 1, stationSum: 0.5, referenceSum: 0.5 },
      { year: 2001, station: 2, reference: 1, ratio: 1, stationSum: 1.5, referenceSum: 1.5 },
      { year: 2002, station: 3, reference: 1.5, ratio: 1, stationSum: 3, referenceSum: 3 },
    ]);
    expect(result.ratioTrend).toMatchObject({ slopePerDecade: 0, percentPerDecade: 0, p: 1 });
    expect(result.correlation).toBe(1);
  });

  test('takes shared weather out: a slow loss that the minima alone do not show is found in the ratio', () => {
    const loss = (i: number) => 1 - 0.004 * (i - 14.5);
    const station = site('A', 1981, noisy(2, loss));
    const result = comparePair(station, [site('B', 1981, noisy(30)), site('C', 1981, noisy(0.4))], TERMS, '');
    expect(result.stationTrend?.p).toBeGreaterThan(0.1);
    expect(result.ratioTrend?.p).toBeLessThan(0.001);
    expect(result.ratioTrend?.percentPerDecade).toBeCloseTo(-4, 0);
    expect(result.sentence).toMatch(
      /^Against the mean of B at Ford and C at Ford, the 7-day minimum of A at Ford lost [34](\.\d)? % of the mean ratio per decade \(95 % interval −.* to −.*; p below 0\.001\), 1981–2010, 30 common years: drier than/,
    );
    expect(result.warnings).toEqual([]);
  });

  test('finds nothing in the ratio where station and reference fall together', () => {
    const loss = (i: number) => 1 - 0.015 * i;
    const result = comparePair(site('A', 1981, noisy(2, loss)), [site('B', 1981, noisy(9, loss))], TERMS, '');
    expect(result.stationTrend?.percentPerDecade).toBeLessThan(-5);
    expect(result.ratioTrend?.p).toBeGreaterThan(0.1);
    expect(result.sentence).toMatch(
      /^No significant change against B at Ford: .*does not show that nothing changed\.$/,
    );
  });

  test('the trend of the ratio is the test and slope of the ratios, over the gaps that the records have', () => {
    const years = [1981, 1982, 1985, 1986, 1990, 1991, 1992, 1997];
    const own = years.map((_, i) => 5 - 0.2 * i + 0.3 * Math.sin(i));
    const other = years.map((_, i) => 2 + 0.5 * Math.cos(2 * i));
    const result = comparePair(
      site('A', 0, own, { years }),
      [site('B', 0, [9, ...other, 9], { years: [1980, ...years, 2005] })],
      TERMS,
      '',
    );
    const ratios = result.years.map(({ ratio }) => ratio);
    const { slope, low, high } = senSlope(years, ratios);
    expect(result.years.map(({ year }) => year)).toEqual(years);
    expect(result.ratioTrend).toMatchObject({
      slopePerDecade: slope * 10,
      low: low * 10,
      high: high * 10,
      p: mannKendall(ratios, { exact: true }).p,
    });
    expect(result.warnings[0]).toBe('Only 8 common years: a trend of so few says little.');
  });

  test('scale plays no part: a station in other units gives the same ratios', () => {
    const station = noisy(1);
    const [small, large] = [0.01, 1000].map((scale) =>
      comparePair(
        site(
          'A',
          1981,
          station.map((value) => value * scale),
        ),
        [site('B', 1981, WEATHER)],
        TERMS,
        '',
      ),
    );
    small.years.forEach(({ ratio }, i) => {
      expect(ratio).toBeCloseTo(large.years[i].ratio, 12);
    });
  });

  test('leaves out the years in which the reference is zero, and says how many', () => {
    const other = WEATHER.map((value, i) => (i < 4 ? 0 : value));
    const result = comparePair(site('A', 1981, noisy(2)), [site('B', 1981, other)], TERMS, '');
    expect(result.years.slice(0, 5).map(({ ratio }) => Number.isNaN(ratio))).toEqual([true, true, true, true, false]);
    expect(result.ratioTrend).not.toBeNull();
    expect(result.warnings).toEqual(['In 4 years the reference is not above 0: left out, for there is no ratio to 0.']);
  });

  test('says of a reference that it is not natural, on the same river, or derived', () => {
    const result = comparePair(
      site('A', 1981, noisy(2), { river: 'Aune' }),
      [
        site('B', 1981, noisy(1), { influence: 'regulated' }),
        site('C', 1981, noisy(1), { influence: 'unknown' }),
        site('D', 1981, noisy(1), { river: 'aune ', derivedFrom: 'A + E' }),
      ],
      TERMS,
      '',
    );
    expect(result.warnings.map((warning) => warning.slice(0, 29))).toEqual([
      'B at Ford is regulated: what ',
      'Whether C at Ford is natural ',
      'D at Ford lies on the same ri',
      'D at Ford is a derived record',
    ]);
  });

  test('the same seed gives the same block-bootstrap answer', () => {
    const compare = () =>
      comparePair(
        site('A', 1981, WEATHER),
        [
          site(
            'B',
            1981,
            WEATHER.map((each, i) => each + (i % 3)),
          ),
        ],
        { ...TERMS, serialCorrection: 'block-bootstrap' },
        'seed',
      );
    expect(compare()).toEqual(compare());
  });

  test('more zero-flow days than the reference is drier', () => {
    const days = WEATHER.map((_, i) => 10 + 2 * i);
    const result = comparePair(
      site('A', 1981, days),
      [
        site(
          'B',
          1981,
          WEATHER.map((each) => 20 + each),
        ),
      ],
      { ...TERMS, index: 'zero-flow-days' },
      '',
    );
    expect(result.sentence).toMatch(/gained .* drier than the reference would have it/);
  });
});

describe('comparePair refuses in words', () => {
  const problemOf = (station: PairSite, references: PairSite[], terms: Partial<PairTerms> = {}) => {
    const result = comparePair(station, references, { ...TERMS, ...terms }, '');
    expect(result).toMatchObject({ stationTrend: null, referenceTrend: null, ratioTrend: null, correlation: null });
    expect(result.sentence).toBe(result.problem);
    return result.problem;
  };
  const station = site('A', 1981, WEATHER);

  test('a reference without flows', () => {
    expect(problemOf(station, [site('B', 1981, []), site('C', 1981, [])])).toBe(
      'B at Ford and C at Ford have no usable year in 1981–2010. Choose another station, or other years in the basis.',
    );
  });

  test('no common years, and fewer than three', () => {
    expect(problemOf(site('A', 1981, [1, 2, 3, 4]), [site('B', 1990, [1, 2, 3, 4])])).toBe(
      'A at Ford and B at Ford have no usable year in common in 1981–2010; 3 are needed. Choose other references, or each station’s own years in the basis.',
    );
    const two = [site('A', 1981, [1, 2, 3, 4]), site('B', 1983, [1, 2, 3, 4])] as const;
    expect(problemOf(two[0], [two[1]], { period: null })).toBe(
      'A at Ford and B at Ford have only 2 usable years (1983, 1984) in common; 3 are needed. Choose other references.',
    );
    expect(comparePair(two[0], [site('B', 1982, [1, 2, 3, 4])], TERMS, '').problem).toBeNull();
  });

  test('a reference that is zero in every year, or in all but two', () => {
    expect(problemOf(station, [site('B', 1981, new Array(30).fill(0))])).toMatch(
      /^The mean 7-day minimum of B at Ford is not above 0 over the 30 common years/,
    );
    const nearly = WEATHER.map((value, i) => (i < 28 ? 0 : value));
    expect(problemOf(station, [site('B', 1981, nearly)])).toMatch(/is above 0 in only 2 of the 30 common years/);
  });

  test('a station that is zero in every year', () => {
    expect(
      problemOf(
        site('A', 1981, new Array(30).fill(0)),
        [station].map((each) => ({ ...each, code: 'B' })),
      ),
    ).toMatch(/^The mean 7-day minimum of A at Ford is not above 0/);
  });

  test('a station listed under Drying, and a ratio of dates', () => {
    expect(problemOf({ ...station, drying: true }, [site('B', 1981, WEATHER)])).toMatch(/^A at Ford is listed under/);
    expect(problemOf(station, [site('B', 1981, WEATHER)], { index: 'minimum-date' })).toMatch(/^A ratio of dates/);
  });

  test('wrong calls: no reference, the station itself, one reference twice', () => {
    const compare = (references: PairSite[]) => () => comparePair(station, references, TERMS, '');
    expect(compare([])).toThrow('comparePair: references must name at least one station, got none');
    expect(compare([station])).toThrow('comparePair: references must not hold the station itself, got A');
    expect(compare([site('B', 1981, WEATHER), site('B', 1981, WEATHER)])).toThrow(
      'comparePair: references must differ, got B twice',
    );
  });
});
