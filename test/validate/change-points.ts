/** What a change point is worth that the data suggested. */
import { pettitt } from '../../lib/statistics/pettitt.ts';
import { rankSum } from '../../lib/statistics/rank-sum.ts';
import type { Scenario } from './figure.ts';
import { noise } from './noise.ts';

const YEARS = 40;
const NOMINAL = 0.05;
/** A straight trend that falls by two standard deviations in forty years. */
const STRAIGHT = -0.05;

const series = (lag1: number, label: string, i: number): Float64Array =>
  noise({ stations: 1, years: YEARS, lag1, shared: 0 }, label, lag1, i)[0];

const alarms = (lag1: number, slope: number, size: number): number[] =>
  Array.from({ length: size }, (_, i) => {
    const values = series(lag1, 'pettitt', i).map((value, t) => value + slope * t);
    return pettitt(values).p < NOMINAL ? 1 : 0;
  });

/** A rank-sum test at the break that the same series suggested. */
const testedBreaks = (lag1: number, size: number): number[] =>
  Array.from({ length: size }, (_, i) => {
    const values = series(lag1, 'suggested', i);
    const { at } = pettitt(values);
    if (at >= YEARS - 1) return 0;
    return rankSum(values.subarray(0, at + 1), values.subarray(at + 1)).p < NOMINAL ? 1 : 0;
  });

export const changePoints: Scenario[] = [
  ...[0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'change-point-alarms',
      of: 'approximate p',
      setting: `lag-1 ${lag1}`,
      cases: 4000,
      run: (size) => alarms(lag1, 0, size),
    }),
  ),
  {
    claim: 'change-point-alarms',
    of: 'approximate p',
    setting: 'straight trend of two standard deviations',
    cases: 4000,
    run: (size) => alarms(0, STRAIGHT, size),
  },
  ...[0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'suggested-break-tested',
      of: 'rank-sum',
      setting: `lag-1 ${lag1}`,
      cases: 4000,
      run: (size) => testedBreaks(lag1, size),
    }),
  ),
];
