import { describe, expect, test } from 'vitest';
import {
  BASIS_KEYS,
  type Basis,
  BasisError,
  basisFromQuery,
  basisHash,
  basisSentence,
  basisSentenceParts,
  basisText,
  basisToQuery,
  DEFAULT_BASIS,
  parseBasis,
  type ResolvedBasis,
  seasonProblem,
  yearWords,
} from '../../lib/basis.ts';

const resolved = (keys: Partial<ResolvedBasis> = {}): ResolvedBasis => ({
  ...DEFAULT_BASIS,
  period: [1985, 2024],
  yearStart: 4,
  asked: { period: 'common', yearStart: 'auto' },
  ...keys,
});

describe('parseBasis', () => {
  test('of nothing is the defaults', () => {
    expect(parseBasis({})).toEqual({
      period: 'common',
      yearStart: 'auto',
      season: null,
      days: 7,
      maxMissingDays: 18,
      exclude: ['provisional'],
      minYears: 20,
      minCoverage: 0.8,
      normalise: 'area',
      rankBy: 'percent-per-decade',
      trendTest: 'mann-kendall',
      serialCorrection: 'ar1-regional',
      alpha: 0.1,
      units: 'metric',
      index: 'minimum',
    });
  });

  test('lays any subset of keys over a base', () => {
    const base = parseBasis({ days: 30, minYears: 15 });
    expect(parseBasis({ days: 1, period: [1990, 2019] }, base)).toEqual({ ...base, days: 1, period: [1990, 2019] });
  });

  test('takes an undefined key for one not given: the base’s value stands', () => {
    expect(parseBasis({ days: undefined }, parseBasis({ days: 30 })).days).toBe(30);
  });

  test('sorts flags and drops repeats, so that equal bases are equal', () => {
    expect(parseBasis({ exclude: ['suspect', 'ice', 'estimated', 'ice'] }).exclude).toEqual([
      'estimated',
      'ice',
      'suspect',
    ]);
    expect(parseBasis({ exclude: [] }).exclude).toEqual([]);
  });

  test.each<[keyof Basis, unknown[], unknown[]]>([
    ['period', ['common', null, [1985, 2024], [2000, 2000]], ['own', [2024, 1985], [1985], [85, 99], '1985-2024', 5]],
    ['yearStart', ['auto', 1, 12], [0, 13, 1.5, '4', null]],
    ['season', [null, [5, 10], [11, 2], [6, 6]], [[0, 3], [1, 13], [5], 'summer']],
    ['days', [1, 365], [0, 366, 7.5, '7', null]],
    ['maxMissingDays', [0, 365], [-1, 366]],
    ['exclude', [[], ['estimated', 'provisional', 'ice', 'below-detection', 'suspect']], [['rejected'], 'ice', null]],
    ['minYears', [3, 100], [2, 20.5]],
    ['minCoverage', [0, 1], [-0.1, 1.01, 80]],
    ['normalise', ['area', 'mean', 'median', 'none'], ['length', null]],
    ['rankBy', ['percent-per-decade', 'specific-change', 'kendall-tau'], ['slope']],
    ['trendTest', ['mann-kendall'], ['t-test']],
    ['serialCorrection', ['ar1-regional', 'ar1', 'none'], ['pre-whitening']],
    ['alpha', [0.001, 0.5], [0, 0.0009, 0.51, Number.NaN]],
    ['units', ['metric', 'us'], ['imperial']],
  ])('%s: takes its values and refuses the rest by name and value', (key, good, bad) => {
    for (const value of good) expect(parseBasis({ [key]: value })[key]).toEqual(value);
    for (const value of bad) {
      expect(() => parseBasis({ [key]: value }), JSON.stringify(value)).toThrow(BasisError);
      expect(() => parseBasis({ [key]: value })).toThrow(`Basis key "${key}" cannot be ${JSON.stringify(value)}: `);
    }
  });

  test('refuses unknown keys by name and says which there are', () => {
    expect(() => parseBasis({ day: 7, alfa: 0.1 })).toThrow(
      `Unknown basis key "day", "alfa"; the keys are ${BASIS_KEYS.join(', ')}.`,
    );
    expect(() => parseBasis(JSON.parse('{"__proto__": {"days": 1}}'))).toThrow('Unknown basis key "__proto__"');
  });

  test('names every problem at once, each only once', () => {
    const message = (input: object) => {
      try {
        parseBasis(input);
      } catch (error) {
        return (error as Error).message;
      }
      return 'nothing was refused';
    };
    const all = message({ days: 0, alpha: 2, mode: 'x' });
    for (const part of ['"days" cannot be 0', '"alpha" cannot be 2', 'Unknown basis key "mode"'])
      expect(all).toContain(part);
    expect(message({ exclude: ['a', 'b'] }).match(/Basis key/g)).toHaveLength(1);
  });

  test.each([[null], [[]], ['{}'], [7], [undefined]])('refuses %j: a basis is an object', (input) => {
    expect(() => parseBasis(input)).toThrow('A basis must be a JSON object, for example {"days": 30}.');
  });

  test('refuses a season that runs over the end of the low-flow year, and says which start month would do', () => {
    expect(parseBasis({ season: [11, 2], yearStart: 4 }).season).toEqual([11, 2]);
    expect(() => parseBasis({ season: [2, 5], yearStart: 4 })).toThrow(
      'Basis key "season" cannot be [2,5]: null or [firstMonth, lastMonth], each 1–12, inside one low-flow year ' +
        '(February–May runs over the end of a low-flow year that starts in April; a year that starts in February would hold it).',
    );
  });

  test('names the season when it is the base’s and a new year start cuts it', () => {
    const base = parseBasis({ season: [2, 5] });
    expect(() => parseBasis({ yearStart: 4 }, base)).toThrow('Basis key "season" cannot be [2,5]');
  });

  test('changes neither its input nor its base nor the defaults', () => {
    const input = Object.freeze({ exclude: Object.freeze(['suspect', 'ice']) });
    const base = Object.freeze(parseBasis({ days: 3 }));
    parseBasis(input, base);
    expect(Object.isFrozen(DEFAULT_BASIS)).toBe(true);
    expect(Object.isFrozen(DEFAULT_BASIS.exclude)).toBe(true);
    expect(parseBasis({}).exclude).not.toBe(DEFAULT_BASIS.exclude);
  });
});

describe('seasonProblem', () => {
  test('a season may wrap over the calendar year, not over the low-flow year', () => {
    expect(seasonProblem([11, 2], 4)).toBeNull();
    expect(seasonProblem([4, 3], 4)).toBeNull();
    expect(seasonProblem([3, 4], 4)).toContain('a year that starts in March would hold it');
    expect(seasonProblem([11, 2], 1)).toContain('a year that starts in November would hold it');
  });

  test('nothing is amiss without a season, or while the start is not known', () => {
    expect(seasonProblem(null, 4)).toBeNull();
    expect(seasonProblem([3, 4], 'auto')).toBeNull();
  });
});

describe('basisToQuery and basisFromQuery', () => {
  test('a link carries only what differs from the base, in the schema’s order', () => {
    expect(basisToQuery(parseBasis({})).toString()).toBe('');
    expect(basisToQuery(parseBasis({ days: 30, period: [1985, 2024] })).toString()).toBe('period=1985-2024&days=30');
    const base = parseBasis({ days: 30 });
    expect(basisToQuery(parseBasis({}), base).toString()).toBe('days=7');
  });

  test('words stand for null and for an empty list', () => {
    const basis = parseBasis({ period: null, exclude: [], season: null });
    const base = parseBasis({ season: [5, 9] });
    expect(basisToQuery(basis, base).toString()).toBe('period=own&season=none&exclude=none');
    expect(basisFromQuery(new URLSearchParams('period=own&season=none&exclude=none'), base)).toEqual(basis);
    expect(basisFromQuery(new URLSearchParams('exclude=')).exclude).toEqual([]);
    expect(basisFromQuery(new URLSearchParams('period=common'), basis).period).toBe('common');
  });

  test('reads what Next hands a page: text, lists of which the first counts, and undefined', () => {
    expect(basisFromQuery({ days: '30', alpha: ['0.05', '0.2'], minYears: undefined })).toEqual(
      parseBasis({ days: 30, alpha: 0.05 }),
    );
  });

  test('leaves parameters that are no basis keys to others', () => {
    expect(basisFromQuery(new URLSearchParams('zoom=7&select=042&days=3'))).toEqual(parseBasis({ days: 3 }));
  });

  test.each([
    ['days=', '"days" cannot be ""'],
    ['days=seven', '"days" cannot be "seven"'],
    ['days=7.5', '"days" cannot be 7.5'],
    ['period=1985', '"period" cannot be "1985"'],
    ['period=2024-1985', '"period" cannot be [2024,1985]'],
    ['season=5', '"season" cannot be "5"'],
    ['exclude=ice,frost', '"exclude" cannot be ["ice","frost"]'],
    ['yearStart=13', '"yearStart" cannot be 13'],
    ['index=q90', '"index" cannot be "q90": minimum, q95, mean-flow, zero-flow-days, bfi, minimum-date or deficit'],
    ['serialCorrection=ar2', '"serialCorrection" cannot be "ar2": ar1-regional, ar1, none, all-lags'],
    ['alpha=0', '"alpha" cannot be 0: a number 0.001–0.5'],
    ['alpha=1', '"alpha" cannot be 1: a number 0.001–0.5'],
    ['alpha=Infinity', '"alpha" cannot be "Infinity"'],
    ['minYears=Infinity', '"minYears" cannot be "Infinity"'],
  ])('refuses %s by name and value', (query, message) => {
    expect(() => basisFromQuery(new URLSearchParams(query))).toThrow(BasisError);
    expect(() => basisFromQuery(new URLSearchParams(query))).toThrow(message);
  });
});

describe('basisHash', () => {
  test('is 64 hexadecimal digits, the same for the same basis', () => {
    expect(basisHash(DEFAULT_BASIS)).toMatch(/^[0-9a-f]{64}$/);
    expect(basisHash(parseBasis({ exclude: ['ice', 'estimated'] }))).toBe(
      basisHash(parseBasis({ exclude: ['estimated', 'ice', 'ice'] })),
    );
  });

  test('changes with every key', () => {
    const others: Partial<Basis>[] = [
      { period: null },
      { period: [1990, 2019] },
      { yearStart: 4 },
      { season: [5, 9] },
      { days: 30 },
      { maxMissingDays: 17 },
      { exclude: [] },
      { minYears: 21 },
      { minCoverage: 0.81 },
      { normalise: 'mean' },
      { rankBy: 'kendall-tau' },
      { serialCorrection: 'none' },
      { alpha: 0.05 },
      { units: 'us' },
      { index: 'q95' },
    ];
    const hashes = [{}, ...others].map((keys) => basisHash(parseBasis(keys)));
    expect(new Set(hashes).size).toBe(others.length + 1);
  });

  test('basisText holds just the keys asked for', () => {
    expect(basisText(parseBasis({ days: 3 }), ['days', 'season'])).toBe('[["days",3],["season",null]]');
  });
});

describe('basisSentence', () => {
  test('of the defaults, resolved', () => {
    expect(basisSentence(resolved())).toBe(
      'Comparing 7-day minima of April–March years (from the wettest month), 1985–2024 (the common period), ' +
        'at stations with at least 20 usable years (at most 18 days missing) and 80 % of the period, ' +
        'ranked by % of the mean minimum per decade, ' +
        'tested by Mann–Kendall with regional serial correction, 10 % false discoveries; ' +
        'provisional values count as missing, duration curves per unit of drainage area.',
    );
  });

  test('of everything otherwise', () => {
    const basis = resolved({
      period: [1990, 2019],
      yearStart: 1,
      asked: { period: [1990, 2019], yearStart: 1 },
      season: [6, 9],
      days: 30,
      maxMissingDays: 5,
      exclude: ['estimated', 'ice', 'suspect'],
      minYears: 25,
      minCoverage: 0.925,
      normalise: 'median',
      rankBy: 'specific-change',
      serialCorrection: 'none',
      alpha: 0.001,
    });
    expect(basisSentence(basis)).toBe(
      'Comparing 30-day minima of June–September in calendar years, 1990–2019, ' +
        'at stations with at least 25 usable years (at most 5 days missing) and 92.5 % of the period, ' +
        'ranked by change in L/s/km² per decade, ' +
        'tested by Mann–Kendall without serial correction, 0.1 % false discoveries; ' +
        'estimated, ice and suspect values count as missing, duration curves as a ratio to each station’s median flow.',
    );
  });

  test.each([
    [{ index: 'q95' }, 'Comparing annual Q95 of April–March years', 'ranked by % of the mean annual Q95 per decade,'],
    [{ index: 'mean-flow' }, 'Comparing annual mean flow of', 'ranked by % of the mean flow per decade,'],
    [{ index: 'zero-flow-days' }, 'Comparing zero-flow days of', 'ranked by days per decade,'],
    [{ index: 'bfi' }, 'Comparing the baseflow index of', 'ranked by % of the mean baseflow index per decade,'],
    [{ index: 'minimum-date', days: 30 }, 'Comparing dates of the 30-day minimum of', 'ranked by days per decade,'],
    [
      { index: 'deficit' },
      'Comparing deficit volumes below Q90 of',
      'ranked by % of the mean deficit volume per decade,',
    ],
    [{ index: 'deficit', rankBy: 'specific-change' }, 'deficit volumes', 'ranked by change in mm per decade,'],
    [{ index: 'bfi', rankBy: 'specific-change' }, 'baseflow index', 'ranked by change per decade,'],
    [{ index: 'minimum-date', rankBy: 'kendall-tau' }, 'dates', 'ranked by Kendall’s tau,'],
  ] as const)('of %o names the index and its own measure of change', (keys, compared, ranked) => {
    const sentence = basisSentence(resolved(keys));
    expect(sentence).toContain(compared);
    expect(sentence).toContain(ranked);
  });

  test.each([
    ['all-lags', 'corrected for all significant lags'],
    ['pre-whitened', 'on trend-free pre-whitened series'],
    ['block-bootstrap', 'by moving-block bootstrap'],
  ] as const)('names the serial correction %s by what it does', (serialCorrection, words) => {
    expect(basisSentence(resolved({ serialCorrection }))).toContain(`tested by Mann–Kendall ${words}, 10 %`);
  });

  test('says when every station has years of its own, and when there is no common period', () => {
    const own = resolved({ period: null, asked: { period: null, yearStart: 4 } });
    expect(basisSentence(own)).toContain('of April–March years, each station’s own years, at stations');
    expect(basisSentence(own)).toContain('80 % of their span');
    expect(basisSentence(resolved({ period: null }))).toContain('(from the wettest month), no common period, at');
  });

  test('says when no flag counts as missing', () => {
    expect(basisSentence(resolved({ exclude: [] }))).toContain('; no flagged values are left out,');
    expect(basisSentence(resolved({ exclude: ['ice', 'suspect'] }))).toContain(
      '; ice and suspect values count as missing',
    );
  });

  test('its parts are the sentence, and name each term once', () => {
    const parts = basisSentenceParts(resolved());
    expect(parts.map(({ text }) => text).join('')).toBe(basisSentence(resolved()));
    const terms = parts.flatMap(({ term }) => term ?? []);
    expect(terms).toEqual([...new Set(terms)]);
    expect(terms.sort()).toEqual([
      'completeness',
      'days',
      'exclude',
      'normalise',
      'period',
      'rankBy',
      'test',
      'yearStart',
    ]);
  });

  test('yearWords names the months of a low-flow year', () => {
    expect([1, 2, 10, 12].map(yearWords)).toEqual([
      'calendar',
      'February–January',
      'October–September',
      'December–November',
    ]);
  });
});
