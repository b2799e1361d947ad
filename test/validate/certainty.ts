/** Whether rank spans hold the true place, and whether a detectable trend is detected. */
import { certaintyOfRows, simulateStations, simulationTerms } from '../../lib/region/certainty.ts';
import type { Certainty } from '../../lib/region/certainty-types.ts';
import type { SimulationBasis } from '../../lib/region/simulate-station.ts';
import type { SimulatedRow } from '../../lib/region/simulated-family.ts';
import { type TrendFigures, trendFamily, type YearlySeries } from '../../lib/region/trend-family.ts';
import { randomStream } from '../../lib/statistics/random.ts';
import type { Scenario } from './figure.ts';
import { noise, normalRow, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const REPLICATES = 500;
const MEAN = 100;
/** standard deviation of the minima, percent of their mean */
const SPREAD_OF_YEARS = 30;
const LAG1 = 0.3;
const years = yearsFrom(1980, YEARS);

const basisOf = (serialCorrection: SimulationBasis['serialCorrection']): SimulationBasis => ({
  ...{ rankBy: 'percent-per-decade', serialCorrection, alpha: 0.1, index: 'minimum' },
});

function rowOf({ years, values }: YearlySeries, figures: TrendFigures, code: string): SimulatedRow {
  const meanValue = values.reduce((sum, value) => sum + value, 0) / values.length;
  const { slope, intercept, tau, r1, serialFactor } = figures;
  return {
    ...{ code, rank: 1, drying: false, years: [...years], values: [...values], meanValue, trendOf: 'minima' },
    ...{ valueSlope: slope * 10, intercept, percentPerDecade: (slope * 1000) / meanValue, tau, areaKm2: 100 },
    ...{ r1: Number.isNaN(r1) ? null : r1, serialFactor },
  };
}

/** Minima with a trend of so many percent of the mean per decade, which is the mean over the years. */
const withTrend = (row: Float64Array, percent: number): number[] =>
  Array.from(row, (value, t) => MEAN + SPREAD_OF_YEARS * value + (percent / 1000) * MEAN * (t - (YEARS - 1) / 2));

function certaintyOf(
  family: readonly YearlySeries[],
  correction: SimulationBasis['serialCorrection'],
  seed: string,
): Certainty {
  const figures = trendFamily(family, correction, seed);
  const rows = family.map((series, i) => rowOf(series, figures[i], `S${String(i).padStart(2, '0')}`));
  const terms = simulationTerms(rows, basisOf(correction), { replicates: REPLICATES, seed });
  return certaintyOfRows(rows, simulateStations(rows, terms), terms);
}

/** True trends of a region, percent per decade. */
type Trends = (i: number) => number[];

const spreadTrends =
  (spread: number): Trends =>
  (i) => {
    const normal = normalRow(randomStream('validate', 'true trends', spread, i));
    return Array.from({ length: STATIONS }, () => -3 + spread * normal());
  };

/** Five that fall by so many percent per decade; the others level but for a hair, so that each has a true place. */
const fiveSteep =
  (percent: number): Trends =>
  (i) => {
    const normal = normalRow(randomStream('validate', 'five steep', i));
    return Array.from({ length: STATIONS }, (_, station) => (station < 5 ? -percent : 0) + 0.001 * normal());
  };

function region(trends: Trends, i: number) {
  const percents = trends(i);
  const rows = noise({ stations: STATIONS, years: YEARS, lag1: LAG1, shared: 0.5 }, 'spans', i);
  const family = rows.map((row, station) => ({ years, values: withTrend(row, percents[station]) }));
  return { percents, certainty: certaintyOf(family, 'ar1-regional', `spans ${i}`) };
}

/** Share of the stations of each region whose span holds the true place. */
const holding = (trends: Trends, size: number): number[] =>
  Array.from({ length: size }, (_, i) => {
    const { percents, certainty } = region(trends, i);
    const held = certainty.spans.filter(({ rankLow, rankHigh }, station) => {
      const place = 1 + percents.filter((percent) => percent < percents[station]).length;
      return rankLow <= place && place <= rankHigh;
    });
    return held.length / STATIONS;
  });

/** Mean width of the spans of each region as a share of all places. */
const widths = (trends: Trends, size: number): number[] =>
  Array.from({ length: size }, (_, i) => {
    const { spans } = region(trends, i).certainty;
    return spans.reduce((sum, { rankLow, rankHigh }) => sum + (rankHigh - rankLow + 1) / STATIONS, 0) / STATIONS;
  });

/** 1 when a fresh record of the same river, with the trend that the first record could have shown, is found falling. */
const detected = (lag1: number, size: number): number[] =>
  Array.from({ length: size }, (_, i) => {
    const [first] = noise({ stations: 1, years: YEARS, lag1, shared: 0 }, 'first record', lag1, i);
    const [fresh] = noise({ stations: 1, years: YEARS, lag1, shared: 0 }, 'fresh record', lag1, i);
    const { detectable } = certaintyOf([{ years, values: withTrend(first, 0) }], 'ar1', `detectable ${i}`);
    const [{ p, z }] = trendFamily(
      [{ years, values: withTrend(fresh, -(detectable[0].percentPerDecade ?? 0)) }],
      'ar1',
    );
    return p < 0.1 && z < 0 ? 1 : 0;
  });

export const certainty: Scenario[] = [
  ...[3, 6, 12].map(
    (spread): Scenario => ({
      claim: 'span-cover',
      of: 'sieve with shrinkage',
      setting: `true spread ${spread} % per decade`,
      aim: [0.87, 0.93],
      cases: 200,
      run: (size) => holding(spreadTrends(spread), size),
    }),
  ),
  ...[6, 12, 20].map(
    (percent): Scenario => ({
      claim: 'span-cover',
      of: 'sieve with shrinkage',
      setting: `five at −${percent} % among 35 level`,
      aim: [0.82, null],
      cases: 200,
      run: (size) => holding(fiveSteep(percent), size),
    }),
  ),
  {
    claim: 'span-width',
    of: 'sieve with shrinkage',
    setting: 'no differences',
    aim: [0.85, null],
    cases: 200,
    run: (size) => widths(() => new Array<number>(STATIONS).fill(-3), size),
  },
  ...[0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'detectable-trend',
      of: 'ar1',
      setting: `lag-1 ${lag1}`,
      cases: 1000,
      run: (size) => detected(lag1, size),
    }),
  ),
];
