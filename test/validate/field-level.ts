/** How often more stations of a region fall than chance allows, where none has a trend. */
import { type Basis, SERIAL_CORRECTIONS } from '../../lib/basis.ts';
import { beyondChance } from '../../lib/region/beyond-chance.ts';
import { chanceSeries } from '../../lib/region/chance-series.ts';
import { trendFamily } from '../../lib/region/trend-family.ts';
import { fieldLevelName } from '../../lib/region/true-level.ts';
import { permutedKendall } from '../../lib/statistics/permuted-kendall.ts';
import { countsByReplicate } from '../../lib/statistics/trend-bits.ts';
import type { Scenario } from './figure.ts';
import { noise, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const ALPHA = 0.1;
const NOMINAL = 0.05;
const REPLICATES = 1000;
const years = yearsFrom(1980, YEARS);

type Correction = Basis['serialCorrection'];

/** 1 when the count of falling stations is beyond chance. */
function falls(serialCorrection: Correction, lag1: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: STATIONS, years: YEARS, lag1, shared: 0.5 }, 'field', lag1, i);
    const family = rows.map((values, station) => ({ years, values: [...values], label: `S${station}` }));
    const found = trendFamily(family, serialCorrection, `field ${i}`).filter(({ p, z }) => p < ALPHA && z < 0).length;
    const stations = chanceSeries(
      family.map(({ values, label }) => ({
        code: label,
        rank: 1,
        years,
        values,
        trendOf: 'minima',
        serialFactor: null,
      })),
      { alpha: ALPHA, serialCorrection },
    );
    const bits = permutedKendall({ ...stations, replicates: REPLICATES, seed: `field ${i}` });
    const byChance = countsByReplicate(bits, [...family.keys()]);
    return beyondChance(byChance.falling, found).p <= NOMINAL ? 1 : 0;
  });
}

export const fieldLevel: Scenario[] = SERIAL_CORRECTIONS.flatMap((correction) =>
  [0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'field-level',
      of: fieldLevelName('permutation', correction),
      setting: `lag-1 ${lag1}`,
      cases: correction === 'block-bootstrap' ? 200 : 1000,
      run: (size) => falls(correction, lag1, size),
    }),
  ),
);
