import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { shrunkenPlaces } from '../statistics/shrunken-places.ts';
import { type SieveTerms, sieve } from '../statistics/sieve.ts';
import { type Certainty, type DetectableTrend, MOST_STEEPEST, type RankSpan } from './certainty-types.ts';
import { INDEX_FACTS, percentOfMean } from './index-facts.ts';
import { rankingFigure } from './ranking-figure.ts';
import { type SimulationBasis, simulateStation } from './simulate-station.ts';
import { familyTerms, type SimulatedRow } from './simulated-family.ts';

/** All that the simulation of a region's stations has in common. */
export interface SimulationTerms {
  /** null without such a station */
  ranked: SieveTerms | null;
  drying: SieveTerms | null;
  basis: SimulationBasis;
  replicates: number;
  /** names every draw */
  seed: string;
}

/** What the replicates of some stations came to. */
export interface SimulatedStations {
  /** the ranking figure of station i in replicate b at i·replicates + b; NaN throughout for one that has none */
  figures: Float64Array;
  /** of each station, see SimulatedStation */
  detectable: Float64Array;
}

/** The terms of the simulation: ranked and drying stations are families of their own, as they are in the ranking.
 *  @param rows  all ranked and drying rows */
export function simulationTerms(
  rows: readonly SimulatedRow[],
  { rankBy, serialCorrection, alpha, index }: SimulationBasis,
  { replicates, seed }: { replicates: number; seed: string },
): SimulationTerms {
  return {
    ranked: familyTerms(rows.filter(({ drying }) => !drying)),
    drying: familyTerms(rows.filter(({ drying }) => drying)),
    basis: { rankBy, serialCorrection, alpha, index },
    replicates,
    seed,
  };
}

/** Simulates some of the stations: the same figures however they are shared out. */
export function simulateStations(rows: readonly SimulatedRow[], terms: SimulationTerms): SimulatedStations {
  const { replicates, seed, basis } = terms;
  const ranked = terms.ranked && sieve(terms.ranked, seed, replicates);
  const drying = terms.drying && sieve(terms.drying, seed, replicates);
  const figures = new Float64Array(rows.length * replicates).fill(Number.NaN);
  const detectable = new Float64Array(rows.length).fill(Number.NaN);
  rows.forEach((row, i) => {
    const family = row.drying ? drying : ranked;
    if (!family) return;
    const simulated = simulateStation(row, family, basis);
    if (simulated.figures) figures.set(simulated.figures, i * replicates);
    detectable[i] = simulated.detectable;
  });
  return { figures, detectable };
}

/** How sure the places of a ranking are: spans and chances by shrinkage, and the trends that could have been found.
 *
 *  A ranked station without the ranking figure, or with too few consecutive years to be simulated, has no span, and the
 *  others are placed among themselves.
 *  @param rows       all ranked and drying rows, in the order of the ranking
 *  @param simulated  of the same rows in the same order
 *  Source: at shrunkenPlaces and simulateStation. */
export function certaintyOfRows(
  rows: readonly SimulatedRow[],
  { figures, detectable }: SimulatedStations,
  { basis, replicates }: Pick<SimulationTerms, 'basis' | 'replicates'>,
): Certainty {
  const placed = rows.map((_, i) => i).filter((i) => rows[i].rank !== null && !Number.isNaN(figures[i * replicates]));
  const replicated = new Float64Array(placed.length * replicates);
  placed.forEach((i, at) => {
    replicated.set(figures.subarray(i * replicates, (i + 1) * replicates), at * replicates);
  });
  const estimates = placed.map((i) => rankingFigure(rows[i], basis.rankBy) ?? Number.NaN);
  const { spread, low, high, among, most } = shrunkenPlaces({ estimates, replicated, replicates }, MOST_STEEPEST);
  return {
    replicates,
    toldApart: placed.length < 2 || spread > 0,
    trueSpread: spread,
    spans: placed.map(
      (i, at): RankSpan => ({
        code: rows[i].code,
        rankLow: low[at],
        rankHigh: high[at],
        amongSteepest: Array.from(among.subarray(at * most, (at + 1) * most)),
      }),
    ),
    detectable: rows.map((row, i) => detectableTrend(row, detectable[i], basis)),
  };
}

function detectableTrend(row: SimulatedRow, perYear: number, { index }: SimulationBasis): DetectableTrend {
  const perDecade = Number.isNaN(perYear) ? null : perYear * YEARS_PER_DECADE;
  const hasPercent = !row.drying && INDEX_FACTS[index].hasPercent;
  return {
    code: row.code,
    perDecade,
    percentPerDecade: hasPercent ? percentOfMean(perDecade, index, row.meanValue) : null,
  };
}
