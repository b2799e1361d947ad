/** How often more stations of a region fall than chance allows, where none has a trend. */
import { type Basis, SERIAL_CORRECTIONS } from '../../lib/basis.ts';
import { beyondChance } from '../../lib/region/beyond-chance.ts';
import { type ChanceSeries, chanceSeries, medianLag1 } from '../../lib/region/chance-series.ts';
import { CHANCE_METHODS, type ChanceMethod } from '../../lib/region/regional-types.ts';
import { settledTrends } from '../../lib/region/settled-trends.ts';
import { type SievedTask, sievedSums } from '../../lib/region/sieved-chance.ts';
import { trendFamily } from '../../lib/region/trend-family.ts';
import { fieldLevelName } from '../../lib/region/true-level.ts';
import { permutedKendall } from '../../lib/statistics/permuted-kendall.ts';
import { sieveTerms } from '../../lib/statistics/sieve.ts';
import { countsByReplicate, type TrendBits } from '../../lib/statistics/trend-bits.ts';
import type { Scenario } from './figure.ts';
import { noise, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const ALPHA = 0.1;
const NOMINAL = 0.05;
const PERMUTATIONS = 1000;
const SIEVED = 200;
const years = yearsFrom(1980, YEARS);

type Correction = Basis['serialCorrection'];

/** 1 when the count of falling stations is beyond chance. */
function falls(method: ChanceMethod, serialCorrection: Correction, lag1: number, size: number): number[] {
  const basis = { alpha: ALPHA, serialCorrection };
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: STATIONS, years: YEARS, lag1, shared: 0.5 }, 'field', lag1, i);
    const family = rows.map((values, station) => ({ years, values: [...values], label: `S${station}` }));
    const figures = trendFamily(family, serialCorrection, `field ${i}`);
    const found = figures.filter(({ p, z }) => p < ALPHA && z < 0).length;
    const stations = chanceSeries(
      family.map(({ values, label }, station) => {
        const { serialFactor } = figures[station];
        return { code: label, rank: 1, years, values, trendOf: 'minima', serialFactor };
      }),
      basis,
    );
    const bits =
      method === 'permutation'
        ? permutedKendall({ ...stations, replicates: PERMUTATIONS, seed: `field ${i}` })
        : sieved(stations, basis, `field ${i}`);
    const byChance = countsByReplicate(bits, [...family.keys()]);
    return beyondChance(byChance.falling, found).p <= NOMINAL ? 1 : 0;
  });
}

/** The stations of a region on years drawn anew. */
function sieved(series: ChanceSeries, basis: SievedTask['basis'], seed: string): TrendBits {
  const stations = series.codes.map((code, i) => {
    return { code, years, values: Array.from(series.series[i]), slope: series.slopes[i] };
  });
  const terms = sieveTerms([years], medianLag1(series.lag1) ?? 0);
  const sums = sievedSums({ stations, terms, basis, replicates: SIEVED, seed });
  return settledTrends({ sums, lengths: stations.map(() => YEARS), critical: series.corrected, basis });
}

/** A case takes long where series are resampled to be tested, or every replicate needs a slope. */
const casesOf = (method: ChanceMethod, correction: Correction): number => {
  const usual = correction === 'ar1-regional';
  if (method === 'permutation') return usual ? 1000 : 300;
  return usual ? 100 : 40;
};

export const fieldLevel: Scenario[] = CHANCE_METHODS.flatMap((method) =>
  SERIAL_CORRECTIONS.flatMap((correction) =>
    [0, 0.3, 0.5].map(
      (lag1): Scenario => ({
        claim: 'field-level',
        of: fieldLevelName(method, correction),
        setting: `lag-1 ${lag1}`,
        cases: casesOf(method, correction),
        run: (size) => falls(method, correction, lag1, size),
      }),
    ),
  ),
);
