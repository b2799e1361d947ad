import type { ResolvedBasis } from '../basis.ts';
import { regionalKendall } from '../statistics/regional-kendall.ts';
import { ar1VarianceFactor, cutLag1 } from '../statistics/serial-correlation.ts';
import { countsByReplicate, type TrendBits } from '../statistics/trend-bits.ts';
import { beyondChance } from './beyond-chance.ts';
import { medianLag1 } from './chance-series.ts';
import { type Group, groupsOf } from './groups.ts';
import type { Corner } from './in-polygon.ts';
import { type FlowCorrelation, independentSet, type LastingStation } from './independent-set.ts';
import { INDEX_FACTS, testedSeries } from './index-facts.ts';
import { rankingFigure } from './ranking-figure.ts';
import type { Ranking, RankingRow } from './ranking-types.ts';
import {
  chanceSentence,
  discoveriesSentence,
  dryingSentence,
  emptySentence,
  kendallSentence,
  refusalSentence,
  singleSentence,
} from './regional-sentences.ts';
import type { ChanceMethod, GroupAnswer, RegionalAnswers, RegionalKendall } from './regional-types.ts';
import { trueLevelOf } from './true-level.ts';

/** Without a serial correction, chance is told only up to this median lag-1 correlation. */
const MOST_CARRY_OVER = 0.1;

/** A single station is no group: its own test says what there is to say. */
const FEWEST_OF_A_GROUP = 2;

/** What chance does to the ranked stations of a region. */
export interface Chance {
  method: ChanceMethod;
  /** in the order of the ranking */
  bits: TrendBits;
  /** lag-1 correlation of each ranked station, freed of its bias, not yet cut; NaN where it cannot be told */
  lag1: Float64Array;
}

/** What is known of the stations' records beside the ranking. */
export interface SharedWater {
  /** days with a value, by code */
  valuedDays: ReadonlyMap<string, number>;
  /** of all stations of the region */
  correlated: readonly FlowCorrelation[];
}

/** What the ranked stations of a region say together: for all of them, by influence and inside an area, each with every
 *  station and with the independent set.
 *  @param area  as drawn on the map; null: none was
 *  Sources: at the functions that are called. */
export function regionalAnswers(
  { rows, basis, counts }: Ranking,
  chance: Chance,
  { valuedDays, correlated }: SharedWater,
  area: readonly Corner[] | null = null,
): RegionalAnswers {
  const ranked = rows.filter(({ rank }) => rank !== null);
  const lasting = ranked.map((row): LastingStation => ({ ...row, valuedDays: valuedDays.get(row.code) ?? 0 }));
  const { kept, pairs } = independentSet(lasting, correlated);
  const medianR1 = medianLag1(chance.lag1);
  const refused = refusalOf(basis, chance.method, medianR1);
  const places = new Map(ranked.map(({ code }, i) => [code, i]));
  const answer = (group: Group, set: GroupAnswer['set']) =>
    answerOf({ ...group, set, refused, ranked: group.rows.length }, chance, places, basis, counts.ranked);
  const groups = groupsOf(ranked, area).flatMap((group) => [
    answer(group, 'all'),
    answer({ ...group, rows: group.rows.filter(({ code }) => kept.has(code)) }, 'independent'),
  ]);
  return {
    method: chance.method,
    replicates: chance.bits.replicates,
    refused,
    trueLevel: refused === null ? trueLevelOf(chance.method, basis.serialCorrection) : null,
    medianR1,
    groups,
    pairs,
    drying: dryingOf(rows),
  };
}

/** The sieve keeps the carry-over that a test without correction is misled by, and needs no refusal. */
function refusalOf({ serialCorrection }: ResolvedBasis, method: ChanceMethod, medianR1: number | null): string | null {
  if (method === 'sieve' || serialCorrection !== 'none' || medianR1 === null || !(medianR1 > MOST_CARRY_OVER))
    return null;
  return refusalSentence(medianR1, MOST_CARRY_OVER);
}

function answerOf(
  group: Group & { set: GroupAnswer['set']; refused: string | null; ranked: number },
  { bits, lag1 }: Chance,
  places: ReadonlyMap<string, number>,
  basis: ResolvedBasis,
  rankedInAll: number,
): GroupAnswer {
  const { rows, ranked, refused } = group;
  const members = rows.map(({ code }) => places.get(code)!);
  const significant = (sign: number) =>
    rows.filter(({ z, p }) => p !== null && p < basis.alpha && Math.sign(z ?? 0) === sign).length;
  const byChance = ranked >= FEWEST_OF_A_GROUP && refused === null ? countsByReplicate(bits, members) : null;
  const falling = byChance && beyondChance(byChance.falling, significant(-1));
  const rising = byChance && beyondChance(byChance.rising, significant(1));
  const discoveries = {
    falling: rows.filter(({ trend }) => trend === 'falling').length,
    rising: rows.filter(({ trend }) => trend === 'rising').length,
  };
  const kendall = kendallOf(
    rows,
    members.map((i) => lag1[i]),
    basis,
  );
  const signs = signsOf(rows);
  const unsaid = ranked === 0 ? emptySentence(group) : singleSentence(group);
  const chance = falling && rising ? chanceSentence(group, falling, rising, basis) : null;
  return {
    id: group.id,
    label: group.label,
    influence: group.influence,
    set: group.set,
    codes: rows.map(({ code }) => code),
    ranked,
    falling,
    rising,
    discoveries,
    signs,
    kendall,
    sentences: {
      chance: chance ?? (ranked < FEWEST_OF_A_GROUP || refused === null ? unsaid : refused),
      kendall: kendall ? kendallSentence(group, kendall, signs, basis) : unsaid,
      discoveries: ranked > 0 ? discoveriesSentence(group, discoveries, rankedInAll, basis) : unsaid,
    },
  };
}

/** Regional Kendall test of a group with the covariance of its stations and the carry-over of their mean; null for none
 *  and for one. */
function kendallOf(rows: readonly RankingRow[], lag1: readonly number[], basis: ResolvedBasis): RegionalKendall | null {
  if (rows.length < FEWEST_OF_A_GROUP) return null;
  const sites = rows.map(testedSeries);
  const told = lag1.filter((r) => !Number.isNaN(r));
  const r1 = told.length === 0 ? 0 : cutLag1(told.reduce((sum, r) => sum + r, 0) / told.length);
  const meanYears = Math.round(sites.reduce((sum, { years }) => sum + years.length, 0) / sites.length);
  const serialFactor = ar1VarianceFactor(meanYears, r1);
  const { s, z, p } = regionalKendall(sites, serialFactor);
  // ranking figures are turned so that drier is below 0; what is read is the figure's own sign
  const turned = basis.rankBy !== 'kendall-tau' && INDEX_FACTS[basis.index].moreIsDrier;
  const figures = rows.flatMap((row) => rankingFigure(row, basis.rankBy) ?? []);
  const middle = median(turned ? figures.map((figure) => 0 - figure) : figures);
  return { s, z, p, medianFigure: middle, r1, serialFactor };
}

function median(values: readonly number[]): number | null {
  if (values.length === 0) return null;
  const sorted = Float64Array.from(values).sort();
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** By the slope of what was tested: negative is drier. */
function signsOf(rows: readonly RankingRow[]): GroupAnswer['signs'] {
  const signs = { negative: 0, zero: 0, positive: 0 };
  for (const { tau } of rows) {
    if (tau === null || tau === 0) signs.zero++;
    else if (tau < 0) signs.negative++;
    else signs.positive++;
  }
  return signs;
}

function dryingOf(rows: readonly RankingRow[]): RegionalAnswers['drying'] {
  const drying = rows.filter((row) => row.drying);
  if (drying.length === 0) return null;
  const of = (trend: RankingRow['trend']) => drying.filter((row) => row.trend === trend).length;
  const counted = { stations: drying.length, falling: of('falling'), rising: of('rising') };
  return { ...counted, sentence: dryingSentence(counted) };
}
