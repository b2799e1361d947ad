import { expect, test } from 'vitest';
import { basisFromQuery } from '../../../lib/basis.ts';
import { alternativeTerms } from '../../../lib/region/alternative-terms.ts';
import { alternative } from '../../../lib/region/alternatives.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

function termsOf(keys: Parameters<typeof basisOf>[0] = {}, period: [number, number] | null = [1961, 2020], month = 11) {
  const basis = basisOf(keys);
  const asked = { period: basis.period, yearStart: basis.yearStart };
  return alternativeTerms(basis, { ...basis, period, yearStart: month, asked });
}
const ofTerm = (term: string, terms = termsOf()) => terms.filter((each) => each.term === term);

test('alternativeTerms: each term has exactly one choice that the basis says, and it changes nothing', () => {
  for (const term of ['days', 'yearStart', 'season', 'period', 'serialCorrection']) {
    const current = ofTerm(term).filter((each) => each.current);
    expect([term, current.length, current[0].change]).toEqual([term, 1, {}]);
  }
});

test('alternativeTerms: every change, laid over the basis as an address lays it, is the basis that is computed', () => {
  const basis = basisOf();
  for (const each of termsOf()) expect(basisFromQuery(each.change, basis)).toEqual(each.basis);
});

test('alternativeTerms: lengths with that of the basis among them', () => {
  expect(ofTerm('days', termsOf({ days: 10 })).map(({ label }) => label)).toEqual(
    [1, 3, 7, 10, 14, 30, 60, 90].map((days) => `${days}-day minima`),
  );
});

test('alternativeTerms: an index that reads neither length nor season is not asked for either', () => {
  const terms = new Set(termsOf({ index: 'mean-flow' }).map(({ term }) => term));
  expect([...terms].sort()).toEqual(['period', 'serialCorrection', 'yearStart']);
});

test('alternativeTerms: a season that the low-flow year cuts brings its own start month along', () => {
  const change = (month: number) => ofTerm('season', termsOf({}, [1961, 2020], month)).map((each) => each.change);
  expect(change(11)).toEqual([{}, { season: '5-10' }, { season: '11-4' }]);
  expect(change(1)).toEqual([{}, { season: '5-10' }, { season: '11-4', yearStart: '11' }]);
});

test('alternativeTerms: last years shorter than the period and no shorter than minYears', () => {
  const changes = (keys: Parameters<typeof basisOf>[0], period: [number, number] | null) =>
    ofTerm('period', termsOf(keys, period)).map((each) => each.change.period ?? 'current');
  expect(changes({}, [1961, 2020])).toEqual(['current', '1971-2020', '1981-2020', '1991-2020', '2001-2020', 'own']);
  expect(changes({ minYears: 40 }, [1961, 2020])).toEqual(['current', '1971-2020', '1981-2020', 'own']);
  expect(changes({ period: [1990, 2020] }, [1990, 2020])).toEqual([
    'common',
    'current',
    '1991-2020',
    '2001-2020',
    'own',
  ]);
  expect(changes({ period: null }, null)).toEqual(['common', 'current']);
});

test('alternativeTerms: a start month that a season of the basis does not fit into is refused in words', () => {
  const april = ofTerm('yearStart', termsOf({ season: [11, 4], yearStart: 11 })).find(({ label }) =>
    label.startsWith('calendar'),
  );
  expect(april).toMatchObject({ basis: null, change: {}, current: false });
  expect(april?.problem).toContain('runs over the end of a low-flow year that starts in January');
});

test('alternative: counts of the other ranking, and the station that moves furthest', () => {
  const rankingBy = (slopes: number[]) =>
    rankRegion(
      slopes.map((slope, i) => station('ABC'[i], { first: 1980, values: constant(30).map((_, t) => 99 + slope * t) })),
      basisOf({ period: [1980, 2009] }),
      YEAR_START,
    );
  const [terms] = ofTerm('days');
  const found = alternative(terms, rankingBy([-2, -1, 1]), rankingBy([1, -1, -2]));
  expect(found).toMatchObject({ ranked: 3, falling: 2, rising: 1, tau: -1, movedFar: 2, problem: null });
  expect(found.furthest).toMatchObject({ code: 'A', moved: -2 });
  expect(alternative(terms, rankingBy([-2, -1]), rankingBy([-2, -1])).furthest).toBeNull();
});

test('alternative: without a ranking, the reason', () => {
  const [terms] = ofTerm('days');
  const atHand = rankRegion([], basisOf(), YEAR_START);
  expect(alternative(terms, atHand, null, 'no such year')).toMatchObject({
    ranked: 0,
    tau: null,
    problem: 'no such year',
  });
});
