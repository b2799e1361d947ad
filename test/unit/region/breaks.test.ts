import { expect, test } from 'vitest';
import { parseBreakChoice } from '../../../lib/region/break-choice.ts';
import type { Break } from '../../../lib/region/break-types.ts';
import { breaksOfChanges, chosenBreaks, joinBreaks } from '../../../lib/region/known-breaks.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { regionBreaks } from '../../../lib/region/region-breaks.ts';
import { stationBreaks } from '../../../lib/region/station-breaks.ts';
import { suggestedBreak } from '../../../lib/region/suggested-break.ts';
import { rankSum } from '../../../lib/statistics/rank-sum.ts';
import { ar1VarianceFactor } from '../../../lib/statistics/serial-correlation.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

const chosen = (...years: number[]): Break[] => chosenBreaks(years, YEAR_START);

/** Noise of thousandths, the same on every machine. */
function noise(n: number, seed = 7): number[] {
  let state = seed;
  return Array.from({ length: n }, () => {
    state = (state * 1103515245 + 12345) % 2147483648;
    return Math.round(200 * (state / 2147483648 - 0.5)) / 1000;
  });
}

/** A station of 40 years from 1980 on whose level drops by `drop` from 2000 on. */
const stepped = (drop: number, seed?: number): number[] =>
  noise(40, seed).map((value, i) => 2 + value - (i >= 20 ? drop : 0));

function ranked(stations: Record<string, number[]>, keys: Parameters<typeof basisOf>[0] = {}) {
  return rankRegion(
    Object.entries(stations).map(([code, values]) => station(code, { first: 1980, values })),
    basisOf({ serialCorrection: 'none', period: [1980, 2019], ...keys }),
    YEAR_START,
  );
}

test('breaksOfChanges: a change on the first day of a low-flow year parts that year from the one before', () => {
  const yearOf = (date: string, yearStart: number) =>
    breaksOfChanges([{ kind: 'dam', date, note: '' }], yearStart).map(({ year }) => year);
  expect(yearOf('1975-01-01', 1)).toEqual([1975]);
  expect(yearOf('1974-12-31', 1)).toEqual([1975]);
  expect(yearOf('1975-01-02', 1)).toEqual([1976]);
  expect(yearOf('1975-04-01', 4)).toEqual([1975]);
  expect(yearOf('1975-03-31', 4)).toEqual([1975]);
});

test('breaksOfChanges: the first year after is the next low-flow year that begins on or after the date', () => {
  const dam = (date: string) => breaksOfChanges([{ date, kind: 'dam', note: '' }], 4)[0].year;
  expect(dam('1968-03-31')).toBe(1968);
  expect(dam('1968-04-02')).toBe(1969);
  expect(dam('1968-05-01')).toBe(1969);
  expect(breaksOfChanges([{ date: '1968-12-31', kind: 'dam', note: '' }], 1)[0].year).toBe(1969);
});

test('breaksOfChanges: changes of one low-flow year are one break, with the words of both', () => {
  const breaks = breaksOfChanges(
    [
      { date: '1990-01-02', kind: 'weir changed', note: '' },
      { date: '1968-09-01', kind: 'gauge moved', note: '' },
      { date: '1968-05-01', kind: 'dam', note: 'Upper Weir dam' },
    ],
    4,
  );
  expect(breaks).toEqual([
    {
      year: 1969,
      from: 'change',
      words: 'dam, 1968-05-01: Upper Weir dam; gauge moved, 1968-09-01',
      label: 'dam and gauge moved',
    },
    { year: 1990, from: 'change', words: 'weir changed, 1990-01-02', label: 'weir changed' },
  ]);
});

test('joinBreaks: where both name a year the dated change stands', () => {
  const changes = breaksOfChanges([{ date: '1968-05-01', kind: 'dam', note: '' }], 4);
  const joined = joinBreaks(changes, chosenBreaks([1990, 1969, 1990], 4));
  expect(joined.map(({ year, from, label }) => [year, from, label])).toEqual([
    [1969, 'change', 'dam'],
    [1990, 'chosen', 'from 1990/91 on'],
  ]);
});

test.each([
  ['changes', { changes: true, years: [] }],
  ['1990,1975, 1990', { changes: false, years: [1975, 1990] }],
  ['changes,1975', { changes: true, years: [1975] }],
  ['', null],
  ['75', null],
  ['1975-1990', null],
  ['0975', null],
  ['1975,', null],
  [Array.from({ length: 11 }, (_, i) => 1950 + i).join(), null],
])('parseBreakChoice: %j', (text, expected) => {
  expect(parseBreakChoice(text)).toEqual(expected);
});

test('stationBreaks: levels of both parts, their difference with interval and in percent, and the test', () => {
  const { rows, basis } = ranked({ A: stepped(0.5) });
  const { segments, steps, tested, unit, problem } = stationBreaks(rows[0], basis, chosen(2000));
  expect([tested, unit, problem]).toEqual(['7-day minima', 'm³/s', null]);
  expect(segments.map(({ first, last, years }) => [first, last, years])).toEqual([
    [1980, 1999, 20],
    [2000, 2019, 20],
  ]);
  const [step] = steps;
  expect(step.difference).toBeCloseTo(-0.5, 1);
  expect(step.low!).toBeLessThan(step.difference!);
  expect(step.high!).toBeGreaterThan(step.difference!);
  expect(step.percent).toBeCloseTo((100 * step.difference!) / segments[0].median!, 10);
  expect(step.z!).toBeLessThan(-5);
  expect([step.serialFactor, step.warning, step.pAdjusted]).toEqual([1, '', step.p]);
});

test('stationBreaks: ar1 takes the factor of both parts’ years from the whole period’s r1', () => {
  const values = stepped(0.1);
  values[30] = Number.NaN;
  const { rows, basis } = ranked({ A: values }, { serialCorrection: 'ar1' });
  expect(rows[0].r1).toBeGreaterThan(0);
  const [, second] = stationBreaks(rows[0], basis, chosen(1990, 2005)).steps;
  const factor = ar1VarianceFactor(15 + 14, rows[0].r1!);
  expect(second.serialFactor).toBe(factor);
  const after = values.slice(25).filter((value) => !Number.isNaN(value));
  expect(second.p).toBe(rankSum(values.slice(10, 25), after, factor).p);
});

test('stationBreaks: 4 years on a side are not tested, 5 with a warning, 10 without', () => {
  const { rows, basis } = ranked({ A: stepped(0.5) });
  const at = (year: number) => stationBreaks(rows[0], basis, chosen(year)).steps[0];
  expect(at(1984)).toMatchObject({ p: null, difference: null, warning: '4 usable years before: not tested below 5' });
  expect(at(1985).p).not.toBeNull();
  expect(at(1985).warning).toBe('only 5 usable years before: little can be told from them');
  expect(at(1990).warning).toBe('');
});

test('stationBreaks: a break without usable years on both sides is left out by name and reason', () => {
  const values = stepped(0.5);
  values[0] = Number.NaN;
  values[39] = Number.NaN;
  const { rows, basis } = ranked({ A: values });
  const { steps, leftOut, segments } = stationBreaks(rows[0], basis, chosen(1981, 1982, 2018, 2019, 2050));
  expect(steps.map((step) => step.break.year)).toEqual([1982, 2018]);
  expect(leftOut.map(({ break: { year }, reason }) => [year, reason])).toEqual([
    [1981, 'no usable year before it in 1980–2019'],
    [2019, 'no usable year from it on in 1980–2019'],
    [2050, 'no usable year from it on in 1980–2019'],
  ]);
  expect(segments.length).toBe(3);
});

test('stationBreaks: a record without usable years says why, one of equal values has p 1', () => {
  const { rows, basis } = ranked({ A: constant(40), B: [] });
  const of = (code: string) => stationBreaks(rows.find((row) => row.code === code)!, basis, chosen(2000));
  expect(of('B')).toMatchObject({ segments: [], steps: [], problem: 'no usable year in 1980–2019' });
  expect(of('A').steps[0]).toMatchObject({ difference: 0, p: 1, z: 0, percent: 0 });
});

test('stationBreaks: levels of zero have no percentage', () => {
  const values = constant(40).map((_, i) => (i < 20 ? 0 : 1));
  const { rows, basis } = ranked({ A: values });
  // half of the minima are zero: a drying station, compared by its zero-flow days
  expect(rows[0].drying).toBe(true);
  const { tested, unit, steps } = stationBreaks(rows[0], basis, chosen(2000));
  expect([tested, unit, steps[0].percent]).toEqual(['zero-flow days', 'days', null]);
});

test('regionBreaks: ranked stations with the break, adjusted over all steps, counted by label', () => {
  const { rows, basis } = ranked({ C: stepped(0, 3), A: stepped(0.5), B: stepped(-0.5, 5), N: [] });
  const found = regionBreaks({ rows, basis }, () => chosen(2000));
  expect(found.stations.map(({ code }) => code)).toEqual(['A', 'B', 'C']);
  const p = found.stations.map(({ steps }) => steps[0].p!);
  const adjusted = found.stations.map(({ steps }) => steps[0].pAdjusted!);
  // Benjamini–Hochberg of three by hand: the largest stays, the smallest times 3 unless a larger one is less
  const largest = Math.max(...p);
  expect(adjusted[p.indexOf(largest)]).toBe(largest);
  const smallest = Math.min(...p);
  const middle = p.toSorted((a, b) => a - b)[1];
  expect(adjusted[p.indexOf(smallest)]).toBeCloseTo(Math.min(3 * smallest, 1.5 * middle, largest), 12);
  expect(found.summary).toMatchObject([{ label: 'from 2000/01 on', tested: 3, lower: 1, higher: 1 }]);
});

test('regionBreaks: each station’s own breaks; those without are no rows, and a break outside the years is no test', () => {
  const { rows, basis } = ranked({ A: stepped(0.5), B: stepped(0), C: stepped(0) });
  const own: Record<string, Break[]> = {
    A: breaksOfChanges([{ date: '1999-07-01', kind: 'dam', note: '' }], YEAR_START),
    B: breaksOfChanges([{ date: '1899-07-01', kind: 'abstraction', note: '' }], YEAR_START),
  };
  const { stations, summary } = regionBreaks({ rows, basis }, (code) => own[code] ?? []);
  expect(stations.map(({ code, steps, leftOut }) => [code, steps.length, leftOut.length])).toEqual([
    ['A', 1, 0],
    ['B', 0, 1],
  ]);
  expect(summary.map(({ label, tested, lower }) => [label, tested, lower])).toEqual([
    ['abstraction', 0, 0],
    ['dam', 1, 1],
  ]);
});

test('suggestedBreak: names the last year before the step, and says that it is not tested', () => {
  const { rows, basis } = ranked({ A: stepped(0.5) });
  const found = suggestedBreak(rows[0], basis)!;
  // all 20 values before are above all after: K = 20·20
  expect(found).toMatchObject({ lastBefore: 1999, k: 400, besideTrend: true });
  expect(found.words).toContain('would part after 1999/00');
  expect(found.words).toContain('step or trend, not told apart');
  expect(found.words).toContain('Not tested');
});

test('suggestedBreak: with carry-over p comes from resampling, and is the same each time', () => {
  let level = 0;
  const values = noise(60, 11).map((value) => {
    level = 0.6 * level + value;
    return 2 + level;
  });
  const basis = { serialCorrection: 'ar1', period: [1980, 2039] as [number, number] } as const;
  const { rows, basis: resolved } = ranked({ A: values }, basis);
  expect(rows[0].r1).toBeGreaterThan(0.3);
  const found = suggestedBreak(rows[0], resolved)!;
  expect(found.pBySieve).toBe(true);
  expect(found.words).toContain('by resampling with carry-over');
  expect(suggestedBreak(rows[0], resolved)).toEqual(found);
  const approximate = Math.min(1, 2 * Math.exp((-6 * found.k ** 2) / (60 ** 3 + 60 ** 2)));
  expect(found.p).toBeGreaterThan(approximate);
});

test.each(['none', 'all-lags', 'pre-whitened', 'block-bootstrap'] as const)(
  'suggestedBreak: p comes from resampling with carry-over under %s as under ar1',
  (serialCorrection) => {
    let level = 0;
    const values = noise(60, 11).map((value) => {
      level = 0.6 * level + value;
      return 2 + level;
    });
    const period: [number, number] = [1980, 2039];
    const of = (correction: typeof serialCorrection | 'ar1') => {
      const { rows, basis } = ranked({ A: values }, { serialCorrection: correction, period });
      return suggestedBreak(rows[0], basis)!;
    };
    const [found, byAr1] = [of(serialCorrection), of('ar1')];
    expect([found.pBySieve, found.k]).toEqual([true, byAr1.k]);
    expect(Math.abs(found.p - byAr1.p)).toBeLessThan(0.05);
  },
);

test('suggestedBreak: nothing from 9 years, from equal values, or from none', () => {
  const { rows, basis } = ranked({ A: stepped(0.5).slice(0, 9), B: constant(40), C: [] });
  for (const row of rows) expect(suggestedBreak(row, basis)).toBeNull();
});

test.each([
  ['one year', [2]],
  ['two years', [2, 3]],
  ['all zeros', constant(40, 0)],
])('stationBreaks: %s are answered without a figure, or by p 1', (_, values) => {
  const { rows, basis } = ranked({ A: values });
  const [step] = stationBreaks(rows[0], basis, chosen(1981)).steps;
  expect(step?.p ?? null).toBeNull();
});

test('stationBreaks: an infinite value is refused', () => {
  const { rows, basis } = ranked({ A: stepped(0.5) });
  const infinite = { ...rows[0], values: rows[0].values.with(3, Number.POSITIVE_INFINITY) };
  expect(() => stationBreaks(infinite, basis, chosen(2000))).toThrow(RangeError);
});
