import { expect, test } from 'vitest';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { StationMinima } from '../../../lib/region/ranking-types.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

const none = Number.NaN;
const byHand = basisOf({ period: [2001, 2005], minYears: 3, serialCorrection: 'none' });
const ranking = (stations: StationMinima[], basis = byHand) => rankRegion(stations, basis, YEAR_START);
const listed = (stations: StationMinima[], basis = byHand) =>
  ranking(stations, basis).rows.map(({ rank, code }) => `${rank ?? '–'} ${code}`);

/** Five years each; every figure of these can be worked on paper. */
/** The same to a thousandth, so that no row is marked as coarse. */
const fine = [5.013, 4.021, 3.007, 2.019, 1.003];
const fall = station('fall', { first: 2001, values: [5, 4, 3, 2, 1] });
const rise = station('rise', { first: 2001, values: [1, 2, 3, 4, 5] }, { areaKm2: 200 });
const flat = station('flat', { first: 2001, values: [2, 1, 4, 3, 2] }, { areaKm2: null });

test('rankRegion by hand: slopes, percentages, specific change, exact p, adjusted p and places', () => {
  const { rows, counts } = ranking([rise, flat, fall]);
  expect(rows.map(({ code, rank }) => [code, rank])).toEqual([
    ['fall', 1],
    ['flat', 2],
    ['rise', 3],
  ]);
  const [first, second, third] = rows;
  // −1 a year of a mean of 3; S = −10 of 10 pairs; 2 of the 120 orders are as extreme; z = −9/√(50/3)
  expect(first).toMatchObject({
    yearsUsed: 5,
    firstYear: 2001,
    lastYear: 2005,
    meanMinimum: 3,
    meanMinimumSpecific: 30,
    slopePerDecade: -10,
    // C = 1.96·√(50/3) = 8.002: the ranks 0.999 and 10.001 fall outside the ten slopes
    slopeLow: null,
    slopeHigh: null,
    specificPerDecade: -100,
    tau: -1,
    intercept: 2006,
    r1: null,
    serialFactor: 1,
    trend: 'falling',
    trendOf: 'minima',
    zeroFlowYears: 0,
    unrankedReason: null,
    drying: false,
    rankLow: null,
    rankHigh: null,
  });
  expect(first.percentPerDecade).toBeCloseTo(-1000 / 3, 10);
  expect(first.z).toBeCloseTo(-9 / Math.sqrt(50 / 3), 12);
  expect(first.p).toBeCloseTo(2 / 120, 14);
  // p: 1/60, 1/60 and that of flat; the two smallest become 3/2 · 1/60
  expect(first.pAdjusted).toBeCloseTo(1 / 40, 14);
  expect(third.pAdjusted).toBeCloseTo(1 / 40, 14);
  expect(third).toMatchObject({ trend: 'rising', specificPerDecade: 50, meanMinimumSpecific: 15, tau: 1 });
  // 2 1 4 3 2: pairs −1 2 1 0 · 3 2 1 · −1 −2 · −1, so S = 5 − 4 = 1; Var S = (300 − 18)/18; z = 0
  expect(second).toMatchObject({ meanMinimum: 2.4, z: 0, p: 1, pAdjusted: 1, trend: 'none', specificPerDecade: null });
  expect(second.tau).toBeCloseTo(1 / Math.sqrt(90), 12);
  // slopes −1 1 1/3 0 · 3 1 1/3 · −1 −1 · −1 have the middle two 0 and 1/3
  expect(second.slopePerDecade).toBeCloseTo(10 / 6, 12);
  expect(second.percentPerDecade).toBeCloseTo(1000 / 6 / 2.4, 10);
  expect(counts).toEqual({ stations: 3, ranked: 3, drying: 0, unranked: 0, falling: 1, rising: 1 });
});

test('rankRegion says what common and auto came to, and what was asked', () => {
  const basis = basisOf({ minYears: 5 });
  expect(ranking([fall, rise], basis).basis).toEqual({
    ...basis,
    period: [2001, 2005],
    yearStart: YEAR_START,
    asked: { period: 'common', yearStart: 'auto' },
  });
});

test('rankRegion uses the years of the period only', () => {
  const longer = station('longer', { first: 1999, values: [90, 80, 5, 4, 3, 2, 1, 70] });
  expect(ranking([longer]).rows[0]).toMatchObject({
    yearsUsed: 5,
    slopePerDecade: -10,
    years: [2001, 2002, 2003, 2004, 2005],
  });
});

test('rankRegion by specific change puts stations without an area last, and says so', () => {
  const basis = basisOf({ ...byHand, rankBy: 'specific-change' });
  const bare = station('bare', { first: 2001, values: [9, 8, 7, 6, 5] }, { areaKm2: null });
  const stations = [flat, rise, bare, fall];
  expect(listed(stations, basis)).toEqual(['1 fall', '2 rise', '3 bare', '3 flat']);
  const { rows, warnings } = ranking(stations, basis);
  expect(rows[2].note).toContain('no drainage area, so no change in L/s/km²: placed after all that have it');
  expect(warnings).toContain('2 stations are ranked without the ranking figure, after all that have it.');
});

test('rankRegion by tau ranks by tau, and equal minima come last', () => {
  const basis = basisOf({ ...byHand, rankBy: 'kendall-tau' });
  const equal = station('equal', { first: 2001, values: constant(5, 3) });
  expect(listed([equal, flat, rise, fall], basis)).toEqual(['1 fall', '2 flat', '3 rise', '4 equal']);
  const row = ranking([equal], basis).rows[0];
  expect(row).toMatchObject({ tau: null, z: 0, p: 1, trend: 'none', slopePerDecade: 0, percentPerDecade: 0 });
  expect(row.note).toBe('all minima are equal, so no tau: placed after all that have it');
});

test('rankRegion gives equal figures the better place and lists them by code', () => {
  const again = { ...fall, station: { ...fall.station, code: 'also' } };
  expect(listed([rise, fall, again])).toEqual(['1 also', '1 fall', '3 rise']);
});

test('rankRegion lists unranked stations last, by code, with their reasons and what is known of them', () => {
  const short = station('b-short', { first: 2004, values: [2, 4] });
  const empty = station('a-empty', { first: 2001, values: constant(5, none) });
  const { rows, counts } = ranking([short, fall, empty]);
  expect(rows.map(({ code, rank, unrankedReason }) => [code, rank, unrankedReason])).toEqual([
    ['fall', 1, null],
    ['a-empty', null, 'no usable year in 2001–2005'],
    ['b-short', null, '2 usable years, 3 needed; 2 of the 5 years 2001–2005 usable, 4 needed (80 %)'],
  ]);
  expect(rows[2]).toMatchObject({
    yearsUsed: 2,
    firstYear: 2004,
    lastYear: 2005,
    meanMinimum: 3,
    trend: null,
    p: null,
  });
  expect(rows[1]).toMatchObject({
    yearsUsed: 0,
    firstYear: null,
    lastYear: null,
    meanMinimum: null,
    slopePerDecade: null,
  });
  expect(counts).toMatchObject({ stations: 3, ranked: 1, unranked: 2 });
});

test('rankRegion puts drying stations between, by change in zero-flow days, most first, with a family of their own', () => {
  const dry = (code: string, zeroDays: number[]) => station(code, { first: 2001, values: [0, 0, 1, 0, 1], zeroDays });
  const stations = [
    dry('steady', [50, 50, 50, 50, 50]),
    dry('worse', [10, 20, 30, 40, 50]),
    dry('better', [9, 7, 5, 3, 1]),
    fall,
  ];
  const { rows, counts } = ranking(stations);
  expect(rows.map(({ code }) => code)).toEqual(['fall', 'worse', 'steady', 'better']);
  const [, worse, steady, better] = rows;
  expect(worse).toMatchObject({
    rank: null,
    drying: true,
    unrankedReason: '3 of 5 minima are zero, a third or more: listed under Drying, by zero-flow days',
    zeroDaysPerDecade: 100,
    zeroDaysLow: null,
    zeroDaysHigh: null,
    tau: -1,
    trend: 'falling',
    trendOf: 'zero-days',
    zeroFlowYears: 3,
    slopePerDecade: null,
    percentPerDecade: null,
    // what its trend speaks of: days, with the line 10·(year − 2000) through them
    values: [10, 20, 30, 40, 50],
    meanValue: 30,
    valueSlope: 100,
    intercept: -20_000,
  });
  // exact p 1/60 twice and 1: 3/2 · 1/60, apart from the one ranked station, whose p stays 1/60
  expect(worse.pAdjusted).toBeCloseTo(1 / 40, 14);
  expect(rows[0].pAdjusted).toBeCloseTo(1 / 60, 14);
  expect(better).toMatchObject({ trend: 'rising', zeroDaysPerDecade: -20, tau: 1 });
  expect(steady).toMatchObject({ trend: 'none', zeroDaysPerDecade: 0, z: 0, p: 1, tau: null });
  expect(counts).toEqual({ stations: 4, ranked: 1, drying: 3, unranked: 0, falling: 1, rising: 0 });
});

test('rankRegion turns the interval of minus the days over', () => {
  const zeroDays = [3, 9, 4, 12, 8, 15, 11, 14, 20, 13, 22, 18];
  const dry = station('dry', { first: 2001, values: constant(12, 0), zeroDays });
  const row = ranking([dry], basisOf({ ...byHand, period: [2001, 2012] })).rows[0];
  expect(row.zeroDaysLow!).toBeLessThan(row.zeroDaysPerDecade!);
  expect(row.zeroDaysHigh!).toBeGreaterThan(row.zeroDaysPerDecade!);
  expect(row.zeroDaysLow!).toBeGreaterThan(0);
});

test('rankRegion marks a ranked station from 10 % zero minima on', () => {
  const basis = basisOf({ period: [2001, 2020], serialCorrection: 'none' });
  const zeros = (n: number) =>
    station('z', {
      first: 2001,
      values: [...constant(20 - n, 1), ...constant(n, 0)].map((v, i) => v * (1 + i / 1000)),
    });
  expect(ranking([zeros(1)], basis).rows[0].note).toBe('');
  expect(ranking([zeros(2)], basis).rows[0].note).toBe('2 of 20 minima are zero, so its slope is drawn towards 0');
});

test('rankRegion marks a percentage of a mean under ten recording steps', () => {
  const basis = basisOf({ ...byHand, days: 1 });
  const note = (values: number[]) => ranking([station('s', { first: 2001, values })], basis).rows[0].note;
  expect(note([0.12, 0.11, 0.1, 0.09, 0.08])).toBe('');
  expect(note([0.11, 0.11, 0.1, 0.09, 0.08])).toBe(
    'mean minimum is 9.8 recording steps (of 0.01 m³/s, estimated from the minima), so its percentage is coarse',
  );
});

test('rankRegion gives no percentage of a mean that is not above 0', () => {
  const upstream = station('upstream', { first: 2001, values: [-1, -2, -3, -4, -5] });
  const { rows } = ranking([upstream, rise]);
  expect(rows.map(({ code, percentPerDecade }) => [code, percentPerDecade])).toEqual([
    ['rise', expect.closeTo(1000 / 3, 10)],
    ['upstream', null],
  ]);
  expect(rows[1]).toMatchObject({ rank: 2, trend: 'falling', slopePerDecade: -10 });
  expect(rows[1].note).toContain('mean minimum is not above 0');
});

test('rankRegion ranks a derived station like others and notes its recipe', () => {
  const values = [5.013, 4.021, 3.007, 2.019, 1.003];
  const derived = station('sum', { first: 2001, values }, { derivedFrom: 'flow: A + B' });
  const { rows } = ranking([derived, rise]);
  expect(rows.map(({ code, rank, note }) => [code, rank, note.startsWith('derived record, flow: A + B')])).toEqual([
    ['sum', 1, true],
    ['rise', 2, false],
  ]);
  expect('derivedFrom' in rows[1]).toBe(false);
});

test('rankRegion notes a year start that cuts the low season', () => {
  const edge = station('edge', { first: 2001, values: fine, dayOfYear: [5, 5, 5, 5, 5] });
  expect(ranking([edge]).rows[0].note).toBe(
    'year start cuts its low season (5 of 5 minima in the first 30 or last 15 days of the year): a start in November would do',
  );
});

test('rankRegion without a period ranks each station over its own years and says so in every note and a warning', () => {
  const basis = basisOf({ ...byHand, period: null });
  const earlier = station('earlier', { first: 1951, values: fine.slice(0, 4) });
  const empty = station('empty', { first: 1951, values: constant(4, none) });
  const later = station('later', { first: 2001, values: fine });
  const { rows, warnings } = ranking([later, earlier, empty], basis);
  expect(rows.map(({ code, note }) => [code, note])).toEqual([
    ['later', 'own years 2001–2005: periods differ between stations'],
    ['earlier', 'own years 1951–1954: periods differ between stations'],
    ['empty', 'periods differ between stations'],
  ]);
  expect(warnings).toContain(
    'Periods differ: each station is judged over its own years, and short records crowd both ends of such a ranking.',
  );
});

test('rankRegion warns of a region without a common period, of one without a ranked station, and of too short a period', () => {
  expect(ranking([fall], basisOf({ minYears: 20 })).warnings).toEqual([
    'There is no common period: the usable years of the region span fewer than 20 years.',
    'No station is ranked; each row says why.',
  ]);
  expect(ranking([fall], basisOf({ minYears: 20, period: [2001, 2005] })).warnings[0]).toBe(
    'The period 2001–2005 has 5 years, fewer than the 20 usable ones asked for: no station can be ranked.',
  );
});

test('rankRegion says when too few stations are ranked for the regional correction', () => {
  const many = (n: number) =>
    Array.from({ length: n }, (_, i) => station(`s${i}`, { first: 2001, values: [3, 1 + i, 4, 1, 5 + i] }));
  const basis = basisOf({ ...byHand, serialCorrection: 'ar1-regional' });
  expect(ranking(many(9), basis).warnings).toEqual([
    'Fewer than 10 stations are ranked (9), so each is tested with its own serial correction instead of the regional one.',
  ]);
  expect(ranking(many(10), basis).warnings).toEqual([]);
});

test('rankRegion of no station is an empty ranking', () => {
  const { rows, counts, warnings } = ranking([], basisOf());
  expect(rows).toEqual([]);
  expect(counts).toEqual({ stations: 0, ranked: 0, drying: 0, unranked: 0, falling: 0, rising: 0 });
  expect(warnings).toEqual([]);
});

test('rankRegion calls a trend significant below alpha, not at it', () => {
  // one station, exact p = 1/60
  expect(ranking([fall], basisOf({ ...byHand, alpha: 0.0167 })).rows[0].trend).toBe('falling');
  const { p } = ranking([fall]).rows[0];
  expect(ranking([fall], basisOf({ ...byHand, alpha: p! })).rows[0].trend).toBe('none');
});

test('rankRegion refuses a year start that is no month', () => {
  expect(() => rankRegion([fall], byHand, 13)).toThrow('rankRegion: startMonth must be a month 1–12, got 13');
});

test('rankRegion leaves its input as it was', () => {
  const stations = [station('b', { first: 2001, values: [5, 4, 3, 2, 1] }), fall];
  const before = structuredClone(stations);
  ranking(stations);
  expect(stations).toEqual(before);
});
