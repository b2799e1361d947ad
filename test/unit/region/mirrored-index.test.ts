import { expect, test } from 'vitest';
import type { Basis } from '../../../lib/basis.ts';
import { certaintyOfRows, simulateStations, simulationTerms } from '../../../lib/region/certainty.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { Ranking } from '../../../lib/region/ranking-types.ts';
import { regionStartEnd } from '../../../lib/region/region-start-end.ts';
import { simulatedRow } from '../../../lib/region/simulated-family.ts';
import { startEnd } from '../../../lib/region/start-end.ts';
import { seeded } from '../../seeded.ts';
import { basisOf, station, YEAR_START } from './region-fixtures.ts';

const FIRST = 1980;
const YEARS = 34;
const PERIOD: [number, number] = [FIRST, FIRST + YEARS - 1];

/** Whole numbers that carry over, at twelve stations, each with a gap; falling more and more from the first on. */
function figures(): number[][] {
  const random = seeded(9);
  return Array.from({ length: 12 }, (_, i) => {
    let carried = 50;
    return Array.from({ length: YEARS }, (_, year) => {
      carried = 0.5 * carried + 50 * random();
      return year === 3 + i ? Number.NaN : Math.round(60 + carried - 0.06 * i * year);
    });
  });
}

/** Both rankings: of the figures as minima, and of 365 less the figures as days without flow, of which more is drier. */
function mirrored(serialCorrection: Basis['serialCorrection']): [Ranking, Ranking] {
  const rank = (index: Basis['index'], stations: ReturnType<typeof station>[]) =>
    rankRegion(stations, basisOf({ index, serialCorrection, period: PERIOD, rankBy: 'kendall-tau' }), YEAR_START);
  const minima = figures().map((values, i) => station(`S${i}`, { first: FIRST, values }));
  const days = figures().map((values, i) =>
    station(`S${i}`, { first: FIRST, values, zeroDays: values.map((value) => 365 - value) }),
  );
  return [rank('minimum', minima), rank('zero-flow-days', days)];
}

function certaintyOf({ rows, basis }: Ranking) {
  const simulated = rows.map(simulatedRow);
  const terms = simulationTerms(simulated, basis, { replicates: 100, seed: 'mirror' });
  return certaintyOfRows(simulated, simulateStations(simulated, terms), terms);
}

const rounded = (values: Float32Array, sign: 1 | -1 = 1): string[] =>
  Array.from(values, (value) => (sign * value + 0).toFixed(4));

test.each(['ar1-regional', 'ar1', 'none', 'all-lags', 'pre-whitened'] as const)(
  'more days without flow is as dry as less flow is, in every figure (%s)',
  (serialCorrection) => {
    const [minima, days] = mirrored(serialCorrection);
    expect(minima.counts.ranked).toBe(12);
    minima.rows.forEach((row, i) => {
      const other = days.rows[i];
      expect([other.code, other.rank, other.trend]).toEqual([row.code, row.rank, row.trend]);
      expect(other.steadiness).toBe(row.steadiness);
      expect(other.z).toBeCloseTo(row.z!, 9);
      expect(other.valueSlope).toBeCloseTo(-row.valueSlope!, 9);
      const [chart, mirror] = [startEnd(row, minima.basis), startEnd(other, days.basis)];
      expect(rounded(mirror.z)).toEqual(rounded(chart.z));
      expect(rounded(mirror.slopePerDecade, -1)).toEqual(rounded(chart.slopePerDecade));
    });
    expect(regionStartEnd(days.rows, days.basis, PERIOD)).toEqual(regionStartEnd(minima.rows, minima.basis, PERIOD));
    const [sure, mirror] = [certaintyOf(minima), certaintyOf(days)];
    expect(mirror.spans.map(({ rankLow, rankHigh }) => [rankLow, rankHigh])).toEqual(
      sure.spans.map(({ rankLow, rankHigh }) => [rankLow, rankHigh]),
    );
    sure.detectable.forEach(({ perDecade }, i) => {
      expect(mirror.detectable[i].perDecade).toBeCloseTo(perDecade!, 6);
    });
  },
);
