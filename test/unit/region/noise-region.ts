import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { Ranking, StationFacts } from '../../../lib/region/ranking-types.ts';
import { type RandomStream, randomStream } from '../../../lib/statistics/random.ts';
import { basisOf, station, YEAR_START } from './region-fixtures.ts';

/** Invented regions whose truth is known: yearly values that carry over from year to year and are shared by neighbours. */
export interface NoiseRegion {
  stations: number;
  years: number;
  /** correlation of a year with the one before */
  lag1: number;
  /** correlation between any two stations in the same year */
  shared: number;
  /** trend laid under all of it, standard deviations a year */
  slope?: number;
}

const RUN_IN = 40;
/** Far from 0, so that no minimum is zero. */
const LEVEL = 20;
export const FIRST_YEAR = 1981;

/** Twelve uniform numbers make a normal one, near enough for a test. */
const normal = (random: RandomStream): number => {
  let sum = -6;
  for (let i = 0; i < 12; i++) sum += random.uniform();
  return sum;
};

/** Values by station, year by year. */
export function noiseRows(
  { stations, years, lag1, shared, slope = 0 }: NoiseRegion,
  seed: string | number,
): number[][] {
  const random = randomStream('noise', seed);
  const rows = Array.from({ length: stations }, () => [] as number[]);
  const state = new Float64Array(stations);
  for (let year = -RUN_IN; year < years; year++) {
    const weather = normal(random);
    for (let i = 0; i < stations; i++) {
      const innovation = Math.sqrt(shared) * weather + Math.sqrt(1 - shared) * normal(random);
      state[i] = lag1 * state[i] + Math.sqrt(1 - lag1 * lag1) * innovation;
      if (year >= 0) rows[i].push(LEVEL + state[i] + slope * year);
    }
  }
  return rows;
}

/** The ranking of such a region. */
export function noiseRanking(
  region: NoiseRegion,
  seed: string | number,
  keys: Parameters<typeof basisOf>[0] = {},
  factsOf: (i: number) => Partial<StationFacts> = () => ({}),
): Ranking {
  const stations = noiseRows(region, seed).map((values, i) =>
    station(`S${String(i).padStart(3, '0')}`, { first: FIRST_YEAR, values }, { river: `River ${i}`, ...factsOf(i) }),
  );
  return rankRegion(stations, basisOf({ yearStart: YEAR_START, ...keys }), YEAR_START);
}
