import type { Basis } from '../basis.ts';
import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { criticalS } from '../statistics/critical-s.ts';
import { detectableSlope, replicateSlopes } from '../statistics/replicate-slopes.ts';
import { type Sieve, sieveResiduals } from '../statistics/sieve.ts';
import { tauOnSlope } from '../statistics/tau-on-slope.ts';
import { INDEX_FACTS, isOfMinus, percentOfMean } from './index-facts.ts';
import { rankingFigure } from './ranking-figure.ts';
import { type SimulatedRow, type TestedLine, testedLine } from './simulated-family.ts';

/** The keys of the basis that the simulation reads. */
export type SimulationBasis = Pick<Basis, 'rankBy' | 'serialCorrection' | 'alpha' | 'index'>;

/** What the replicates of one station came to. */
export interface SimulatedStation {
  /** the ranking figure in each replicate; null for a station that has none, or that cannot be simulated */
  figures: Float64Array | null;
  /** slope per year, as tested, that the test finds in four replicates of five; NaN when no slope is found, or unknown */
  detectable: number;
}

const NOT_SIMULATED: SimulatedStation = { figures: null, detectable: Number.NaN };

/** Simulates one station by the sieve of its family: its ranking figure about its own slope, and the trend that the test
 *  would have found where there is none.
 *
 *  The detectable trend is that of the test as the ranking ran it, at the basis's alpha for the one station by itself: the
 *  factor for serial correlation stays that of the record. Pre-whitened stations are whitened by the record's r1.
 *  @returns no figures and NaN for a station with fewer than three pairs of consecutive years; NaN for one with the same
 *           value in more than half of its years */
export function simulateStation(row: SimulatedRow, sieve: Sieve, basis: SimulationBasis): SimulatedStation {
  const line = testedLine(row);
  const replicates = line && sieve.of({ years: line.years, residuals: sieveResiduals(line) }, row.code);
  if (!line || !replicates) return NOT_SIMULATED;
  const { length } = replicates;
  const present = line.years.map((year) => year - line.years[0]);
  const white = basis.serialCorrection === 'pre-whitened' && row.r1 !== null ? whitening(present, row.r1, basis) : null;
  const slopes = replicateSlopes(length, present, white ? Number.POSITIVE_INFINITY : critical(present, row, basis));
  const figureOf = figureInReplicate(row, line, basis);

  const x = new Float64Array(length);
  const figures = figureOf && new Float64Array(sieve.replicates);
  const rejected = new Float64Array(sieve.replicates);
  for (let b = 0; b < sieve.replicates; b++) {
    replicates.next(x);
    const slope = slopes.read(x);
    rejected[b] = white ? white(x, slope) : slopes.rejected();
    if (figures && figureOf) figures[b] = figureOf(x, slope, slopes.mean());
  }
  return { figures, detectable: mostlyOneValue(line.values) ? Number.NaN : detectableSlope(rejected) };
}

/** Whether more than half of the values are one and the same, as the days without flow of a river that rarely runs dry. Such
 *  years scatter by nothing about their median, and replicates that are never tied would find trends of next to nothing. */
function mostlyOneValue(values: readonly number[]): boolean {
  const sorted = Float64Array.from(values).sort();
  // a value that fills more than half of the places stands in the middle one
  const middle = sorted[sorted.length >> 1];
  return 2 * sorted.filter((value) => value === middle).length > sorted.length;
}

/** The smallest S that a station's test rejects; the values of a replicate are never tied. */
function critical(
  { length: n }: ArrayLike<number>,
  { serialFactor }: Pick<SimulatedRow, 'serialFactor'>,
  { alpha, serialCorrection }: SimulationBasis,
): number {
  const variance = (n * (n - 1) * (2 * n + 5)) / 18;
  return criticalS({ n, variance, alpha, varianceFactor: serialFactor ?? 1, exact: serialCorrection === 'none' });
}

/** The slope that is found in a replicate that is whitened by r1 before it is tested. The Theil–Sen slope is taken out and
 *  put back whole, so that a slope b laid on the replicate changes the whitened values by b·t and no less. */
function whitening(present: readonly number[], r1: number, basis: SimulationBasis) {
  const kept = present.filter((place, i) => i > 0 && present[i - 1] === place - 1);
  if (kept.length < 2) return () => Number.NaN;
  const length = present[present.length - 1] + 1;
  const slopes = replicateSlopes(length, kept, critical(kept, { serialFactor: 1 }, basis));
  const white = new Float64Array(length).fill(Number.NaN);
  return (x: Float64Array, slope: number): number => {
    // w_t = (x_t − b·t) − r1·(x_{t−1} − b·(t − 1)) + b·t, up to its level
    for (const place of kept) white[place] = x[place] - r1 * x[place - 1] + r1 * slope * place;
    slopes.read(white);
    return slopes.rejected();
  };
}

type FigureOf = (x: Float64Array, slope: number, mean: number) => number;

/** The ranking figure of a replicate, from its residuals, their slope and their mean; null for a station that has none.
 *  Percentages are of the replicate's own mean; of the record's where that is not above 0, which would turn the sign. */
function figureInReplicate(row: SimulatedRow, line: TestedLine, { rankBy, index }: SimulationBasis): FigureOf | null {
  if (rankingFigure(row, rankBy) === null) return null;
  if (rankBy === 'kendall-tau') {
    return (x, _slope) => {
      const tau = tauOnSlope(x, line.slope);
      // all values of the replicate are equal: it goes neither way
      return Number.isNaN(tau) ? 0 : tau;
    };
  }
  const perDecade = isOfMinus(row.trendOf) ? -YEARS_PER_DECADE : YEARS_PER_DECADE;
  // what a slope of 1 a year comes to
  const percentPerDecade = percentOfMean(perDecade, index, row.meanValue);
  const unit = rankingFigure({ ...row, valueSlope: perDecade, percentPerDecade }, rankBy) ?? Number.NaN;
  if (rankBy !== 'percent-per-decade' || !INDEX_FACTS[index].hasPercent)
    return (_x, slope) => unit * (line.slope + slope);
  // residuals are centred about their mean, which lies above their median where a few wet years stand out
  const sign = isOfMinus(row.trendOf) ? -1 : 1;
  const ofRecord = row.meanValue ?? Number.NaN;
  return (_x, slope, mean) => {
    const own = ofRecord + sign * mean;
    return (unit * (line.slope + slope) * ofRecord) / (own > 0 ? own : ofRecord);
  };
}
