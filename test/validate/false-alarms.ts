/** How often a test finds a trend where there is none, and how often a discovery is false. */
import type { Basis } from '../../lib/basis.ts';
import { FALSE_ALARM_LAGS } from '../../lib/region/simulated-figures.ts';
import { trendFamily } from '../../lib/region/trend-family.ts';
import type { Scenario } from './figure.ts';
import { longMemory, noise, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const NOMINAL = 0.05;
const years = yearsFrom(1980, YEARS);

type Correction = Basis['serialCorrection'];

/** Most false alarms that the default's own part may give, by lag-1 correlation. */
const AIMS: Partial<Record<Correction, number[]>> = {
  ar1: [0.055, 0.075, 0.095],
  'ar1-regional': [0.055, 0.075, 0.095],
};

/** Series are tested one by one, but for the regional correction, which needs a region: 40 stations with correlation 0.5. */
function alarms(correction: Correction, lag1: number, size: number): number[] {
  const regional = correction === 'ar1-regional';
  const stations = regional ? STATIONS : 1;
  const results: number[] = [];
  for (let i = 0; results.length < size; i++) {
    const rows = noise({ stations, years: YEARS, lag1, shared: regional ? 0.5 : 0 }, 'alarms', lag1, stations, i);
    const figures = trendFamily(
      rows.map((values) => ({ years, values: [...values] })),
      correction,
      `alarms ${i}`,
    );
    const share = figures.filter(({ p }) => p < NOMINAL).length / stations;
    results.push(share);
  }
  return results;
}

/** Regions of 40 without any trend: 1 when anything is declared at all. */
function anyDiscovery(correction: Correction, lag1: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: STATIONS, years: YEARS, lag1, shared: 0.5 }, 'discoveries', lag1, i);
    const figures = trendFamily(
      rows.map((values) => ({ years, values: [...values] })),
      correction,
      `discoveries ${i}`,
    );
    return figures.some(({ pAdjusted }) => pAdjusted < 0.1) ? 1 : 0;
  });
}

function longMemoryAlarms(hurst: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const values = [...longMemory(YEARS, hurst, i)];
    return trendFamily([{ years, values }], 'ar1')[0].p < NOMINAL ? 1 : 0;
  });
}

const CORRECTIONS: Correction[] = ['none', 'all-lags', 'pre-whitened', 'block-bootstrap', 'ar1', 'ar1-regional'];

/** Cases of a full run: a region of 40 counts as one case, and a bootstrap takes its time. */
const casesOf = (correction: Correction): number =>
  correction === 'ar1-regional' ? 400 : correction === 'block-bootstrap' ? 2000 : 4000;

export const falseAlarms: Scenario[] = [
  ...CORRECTIONS.flatMap((of) =>
    FALSE_ALARM_LAGS.map(
      (lag1, i): Scenario => ({
        claim: 'false-alarms',
        of,
        setting: `lag-1 ${lag1}`,
        aim: AIMS[of] ? [null, AIMS[of][i]] : undefined,
        cases: casesOf(of),
        run: (size) => alarms(of, lag1, size),
      }),
    ),
  ),
  ...(['none', 'ar1', 'ar1-regional'] as const).flatMap((of) =>
    FALSE_ALARM_LAGS.map(
      (lag1): Scenario => ({
        claim: 'false-discoveries',
        of,
        setting: `lag-1 ${lag1}`,
        // alpha 0.1, and a hundredth
        aim: of === 'ar1-regional' ? [null, 0.11] : undefined,
        cases: of === 'ar1-regional' ? 4000 : 1000,
        run: (size) => anyDiscovery(of, lag1, size),
      }),
    ),
  ),
  ...[0.7, 0.8].map(
    (hurst): Scenario => ({
      claim: 'long-memory',
      of: 'ar1',
      setting: `Hurst ${hurst}`,
      cases: 4000,
      run: (size) => longMemoryAlarms(hurst, size),
    }),
  ),
];
