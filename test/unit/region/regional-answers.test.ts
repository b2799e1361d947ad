import { describe, expect, test } from 'vitest';
import { chanceSeries } from '../../../lib/region/chance-series.ts';
import type { Ranking, RankingRow } from '../../../lib/region/ranking-types.ts';
import { type Chance, regionalAnswers, type SharedWater } from '../../../lib/region/regional-answers.ts';
import type { GroupAnswer, RegionalAnswers } from '../../../lib/region/regional-types.ts';
import { permutedKendall } from '../../../lib/statistics/permuted-kendall.ts';
import { noiseRanking } from './noise-region.ts';
import { rankedRow, resolvedBasis } from './region-fixtures.ts';

const NO_WATER: SharedWater = { valuedDays: new Map(), correlated: [] };
const REGION = { stations: 12, years: 40, lag1: 0, shared: 0.3 };

function chanceOf({ rows, basis }: Ranking, replicates = 500): Chance {
  const stations = chanceSeries(rows, basis);
  return {
    method: 'permutation',
    bits: permutedKendall({ ...stations, replicates, seed: 'test' }),
    lag1: stations.lag1,
  };
}

const answersTo = (ranking: Ranking, water = NO_WATER, area?: Parameters<typeof regionalAnswers>[3]) =>
  regionalAnswers(ranking, chanceOf(ranking), water, area);

function group({ groups }: RegionalAnswers, id: string, set: GroupAnswer['set'] = 'all'): GroupAnswer {
  const found = groups.find((one) => one.id === id && one.set === set);
  if (!found) throw new Error(`no group ${id} ${set}`);
  return found;
}

function rankingOf(rows: RankingRow[], keys: Partial<Ranking['basis']> = {}): Ranking {
  const ranked = rows.filter(({ rank }) => rank !== null).length;
  const counts = { stations: rows.length, ranked, drying: 0, unranked: 0, falling: 0, rising: 0 };
  return { basis: resolvedBasis(keys), rows, counts, warnings: [] };
}

describe('regionalAnswers', () => {
  test('counts by each station’s own p, and by adjusted p apart', () => {
    const ranking = noiseRanking({ ...REGION, slope: -0.05 }, 'falling');
    const all = group(answersTo(ranking), 'all');
    const ranked = ranking.rows.filter(({ rank }) => rank !== null);
    expect(all.ranked).toBe(12);
    expect(all.falling?.count).toBe(ranked.filter(({ p, z }) => p! < 0.1 && z! < 0).length);
    expect(all.discoveries.falling).toBe(ranking.counts.falling);
    expect(all.falling!.count).toBeGreaterThan(all.falling!.bound);
    expect(all.falling!.p).toBeLessThan(0.05);
    expect(all.kendall!.z).toBeLessThan(-1.96);
    expect(all.signs).toEqual({ negative: 12, zero: 0, positive: 0 });
  });

  test('leaves of two stations that share water the longer record in the independent set', () => {
    const ranking = noiseRanking(REGION, 'pairs');
    const water = {
      valuedDays: new Map([
        ['S001', 9],
        ['S002', 8],
      ]),
      correlated: [{ a: 'S001', b: 'S002', correlation: 0.99 }],
    };
    const answers = answersTo(ranking, water);
    expect(answers.pairs).toEqual([{ kept: 'S001', left: 'S002', reason: 'correlation', figure: 0.99 }]);
    expect(group(answers, 'all', 'independent').codes).toHaveLength(11);
    expect(group(answers, 'all', 'independent').codes).not.toContain('S002');
    expect(group(answers, 'all').codes).toHaveLength(12);
  });

  test('tells natural stations from regulated ones, and those of an area drawn', () => {
    const ranking = noiseRanking(REGION, 'groups', {}, (i) => ({
      influence: i < 4 ? 'regulated' : 'natural',
      longitude: i,
      latitude: 0,
    }));
    const answers = answersTo(ranking, NO_WATER, [
      [-0.5, -1],
      [2.5, -1],
      [2.5, 1],
      [-0.5, 1],
    ]);
    expect(group(answers, 'influence:natural').ranked).toBe(8);
    expect(group(answers, 'influence:regulated').ranked).toBe(4);
    expect([...group(answers, 'drawn').codes].sort()).toEqual(['S000', 'S001', 'S002']);
  });

  test('asks a common trend with covariance: stations that are copies are one witness', () => {
    const one = noiseRanking({ ...REGION, stations: 1 }, 'copies', { minYears: 20 }).rows[0];
    const copies = (n: number) =>
      rankingOf(Array.from({ length: n }, (_, i) => ({ ...one, code: `C${i}`, rank: i + 1 })));
    const z = (n: number) => group(answersTo(copies(n)), 'all').kendall!.z;
    // S and √Var S both are n times those of one: only the continuity correction shrinks
    expect(Math.abs(z(20))).toBeGreaterThanOrEqual(Math.abs(z(2)));
    expect(Math.abs(z(20) - z(2))).toBeLessThan(0.02);
  });

  test('refuses to tell chance without serial correction where years carry over, and gives the reason', () => {
    const carrying = noiseRanking({ ...REGION, lag1: 0.5 }, 'carry', { serialCorrection: 'none' });
    const answers = answersTo(carrying);
    expect(answers.medianR1).toBeGreaterThan(0.1);
    expect(answers.refused).toMatch(/^Chance is not told: .*median lag-1 correlation 0\.\d+, above 0\.1/);
    expect(answers.trueLevel).toBeNull();
    expect(group(answers, 'all')).toMatchObject({ falling: null, rising: null });
    expect(group(answers, 'all').sentences.chance).toBe(answers.refused);
    expect(group(answers, 'all').kendall).not.toBeNull();
    expect(regionalAnswers(carrying, { ...chanceOf(carrying), method: 'sieve' }, NO_WATER).refused).toBeNull();
    expect(answersTo(noiseRanking({ ...REGION, lag1: 0.5 }, 'carry', { serialCorrection: 'ar1' })).refused).toBeNull();
    expect(answersTo(noiseRanking({ ...REGION, lag1: -0.3 }, 'none', { serialCorrection: 'none' })).refused).toBeNull();
  });

  test('says of one station that it is no group, and of none that there is none', () => {
    const single = group(answersTo(noiseRanking({ ...REGION, stations: 1 }, 'single')), 'all');
    expect(single).toMatchObject({ ranked: 1, falling: null, rising: null, kendall: null });
    expect(single.sentences.chance).toBe(
      'Only 1 station is ranked, and a single station is no group: its own p says what there is to say.',
    );
    const none = answersTo(noiseRanking({ ...REGION, years: 10 }, 'short'));
    expect(none.groups.map(({ id, ranked }) => [id, ranked])).toEqual([
      ['all', 0],
      ['all', 0],
    ]);
    expect(none.medianR1).toBeNull();
    expect(group(none, 'all').sentences.kendall).toBe(
      'None of the stations is ranked, so nothing can be said of them together.',
    );
    expect(answersTo(rankingOf([]))).toMatchObject({ pairs: [], drying: null });
  });

  test('answers stations whose years are all equal with counts of 0', () => {
    const years = Array.from({ length: 30 }, (_, i) => 1981 + i);
    const flat = (code: string) =>
      rankedRow({
        code,
        years,
        values: years.map(() => 2),
        z: 0,
        p: 1,
        tau: null,
        pAdjusted: 1,
        trend: 'none',
        serialFactor: 1,
      });
    const all = group(answersTo(rankingOf([flat('A'), flat('B')])), 'all');
    expect(all.falling).toEqual({ count: 0, bound: 0, expected: 0, p: 1 });
    expect(all.kendall).toMatchObject({ s: 0, z: 0, p: 1, r1: 0, serialFactor: 1 });
    expect(all.signs).toEqual({ negative: 0, zero: 2, positive: 0 });
  });

  test('states stations under Drying apart and counts none of them', () => {
    const { rows } = noiseRanking(REGION, 'drying');
    const drying = (code: string, trend: RankingRow['trend']) =>
      rankedRow({ code, rank: null, drying: true, trend, trendOf: 'zero-days' });
    const answers = answersTo(rankingOf([...rows, drying('D1', 'falling'), drying('D2', 'none')]));
    expect(group(answers, 'all').ranked).toBe(12);
    expect(answers.drying).toEqual({
      stations: 2,
      falling: 1,
      rising: 0,
      sentence:
        '2 stations under Drying are not counted here: by days without flow, with p adjusted among themselves, 1 dries for longer and none dries for shorter.',
    });
  });

  test('takes an index of which more is drier as falling, in its own words', () => {
    const years = Array.from({ length: 40 }, (_, i) => 1981 + i);
    const row = (code: string) =>
      rankedRow({
        code,
        trendOf: 'zero-flow-days',
        years,
        values: years.map((year) => year - 1980),
        z: -8,
        p: 0,
        tau: -1,
        trend: 'falling',
        valueSlope: 10,
        rank: 1,
      });
    const rows = ['A', 'B', 'C'].map(row);
    const all = group(answersTo(rankingOf(rows, { index: 'zero-flow-days' })), 'all');
    expect(all.kendall!.s).toBe(-3 * 780);
    // the days' own sign: ten more of them per decade
    expect(all.kendall!.medianFigure).toBe(10);
    expect(all.sentences.chance).toMatch(
      /^3 of 3 stations dry for longer at the 10 % level; .* None dries for shorter/,
    );
  });
});
