/** What a region's stations say together. */
import type { Influence } from './ranking-types.ts';

/** How many stations would do it by chance. */
export interface BeyondChance {
  /** ranked stations with unadjusted p < alpha in this direction */
  count: number;
  /** smallest c with P(count ≤ c) ≥ 0.95 where no station has a trend */
  bound: number;
  /** mean count by chance */
  expected: number;
  /** (1 + replicates with at least as many)/(replicates + 1) */
  p: number;
}

/** Regional Kendall test: one common trend at all stations. */
export interface RegionalKendall {
  s: number;
  z: number;
  p: number;
  /** median of the stations' changes in the unit of the basis's rankBy, with their own sign: more zero-flow days are
   *  above 0 */
  medianFigure: number | null;
  /** mean of the stations' lag-1 correlations, 0 to 0.95, and the factor for it, which the test uses under every serial
   *  correction of the basis */
  r1: number;
  serialFactor: number;
}

/** The answer for one group of ranked stations. */
export interface GroupAnswer {
  /** all, influence:natural, …, drawn */
  id: string;
  /** Example: "natural stations" */
  label: string;
  influence: Influence | null;
  /** every station of the group, or only those of the independent set */
  set: 'all' | 'independent';
  codes: string[];
  ranked: number;
  /** null where fewer than two stations are ranked, or chance cannot be told (see `refused`) */
  falling: BeyondChance | null;
  rising: BeyondChance | null;
  /** stations falling and rising by adjusted p (over the whole region), a sentence of its own */
  discoveries: { falling: number; rising: number };
  /** stations whose slope is negative, zero, positive */
  signs: { negative: number; zero: number; positive: number };
  /** null where fewer than two stations are ranked */
  kendall: RegionalKendall | null;
  /** in plain words with figures, one sentence each: beyond chance, one common trend, discoveries */
  sentences: { chance: string; kendall: string; discoveries: string };
}

/** Of two stations that share water, the one left out of the independent set. */
export interface DependentPair {
  kept: string;
  left: string;
  /** same river with areas alike, or flows correlated */
  reason: 'area-ratio' | 'correlation';
  /** area ratio (smaller over larger), or correlation of deseasonalised log flows */
  figure: number;
}

/** How chance is imitated: years in random order, or drawn anew with their carry-over. */
export const CHANCE_METHODS = ['permutation', 'sieve'] as const;
export type ChanceMethod = (typeof CHANCE_METHODS)[number];

export interface RegionalAnswers {
  method: ChanceMethod;
  replicates: number;
  /** why chance cannot be told (no serial correction although low flows carry over); null when it can */
  refused: string | null;
  /** share of regions without any trend in which the test nevertheless finds one at 5 %, simulated; null when refused */
  trueLevel: [number, number] | null;
  medianR1: number | null;
  /** all, then by influence with at least one ranked station, then what was drawn; each for both sets */
  groups: GroupAnswer[];
  pairs: DependentPair[];
  /** stations under Drying, which no group counts: told apart, by adjusted p among themselves; null when there is none */
  drying: { stations: number; falling: number; rising: number; sentence: string } | null;
}
