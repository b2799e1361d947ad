/** What slopes and their intervals are worth: cover, zeros, and unlike lengths of record. */

import { trendFamily } from '../../lib/region/trend-family.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import type { Scenario } from './figure.ts';
import { noise, yearsFrom } from './noise.ts';

const YEARS = 40;
const STATIONS = 40;
const years = yearsFrom(1980, YEARS);
/** Slope that is laid under the noise; the interval must hold it. In standard deviations a year. */
const TRUE_SLOPE = -0.02;

/** Share of the stations of a region whose 95 % interval holds the true slope. */
function cover(lag1: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: STATIONS, years: YEARS, lag1, shared: 0.5 }, 'cover', lag1, i);
    const family = rows.map((row) => ({ years, values: [...row].map((value, t) => value + TRUE_SLOPE * t) }));
    const figures = trendFamily(family, 'ar1-regional', `cover ${i}`);
    return figures.filter(({ low, high }) => low <= TRUE_SLOPE && TRUE_SLOPE <= high).length / STATIONS;
  });
}

/** 1 when the slope of a trendless series that is zero in such a share of years is 0 exactly. */
function levelSlope(zeros: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const [row] = noise({ stations: 1, years: YEARS, lag1: 0.3, shared: 0 }, 'zeros', i);
    const bound = normalQuantile(zeros);
    const values = [...row].map((value) => Math.max(0, value - bound));
    return trendFamily([{ years, values }], 'none')[0].slope === 0 ? 1 : 0;
  });
}

const LENGTHS = [20, 30, 40, 60];
const OF_EACH_LENGTH = 10;

/** Share of the five steepest declines that go to records of one length, in a region of forty with ten of each. */
function steepestOfLength(length: number, size: number): number[] {
  return Array.from({ length: size }, (_, i) => {
    const rows = noise({ stations: LENGTHS.length * OF_EACH_LENGTH, years: 60, lag1: 0.3, shared: 0 }, 'lengths', i);
    const family = rows.map((row, station) => {
      const own = LENGTHS[Math.floor(station / OF_EACH_LENGTH)];
      return { years: yearsFrom(2020 - own, own), values: [...row.subarray(60 - own)] };
    });
    const slopes = trendFamily(family, 'none').map(({ slope }, station) => ({ slope, station }));
    const steepest = slopes.sort((a, b) => a.slope - b.slope).slice(0, 5);
    const place = LENGTHS.indexOf(length);
    return steepest.filter(({ station }) => Math.floor(station / OF_EACH_LENGTH) === place).length / 5;
  });
}

export const slopes: Scenario[] = [
  ...[0, 0.3, 0.5].map(
    (lag1): Scenario => ({
      claim: 'interval-cover',
      of: 'ar1-regional',
      setting: `lag-1 ${lag1}`,
      aim: [0.92, 0.98],
      cases: 400,
      run: (size) => cover(lag1, size),
    }),
  ),
  ...[0.2, 0.3, 0.4].map(
    (zeros): Scenario => ({
      claim: 'slope-exactly-zero',
      of: 'slope',
      setting: `${zeros * 100} % zeros`,
      cases: 4000,
      run: (size) => levelSlope(zeros, size),
    }),
  ),
  ...LENGTHS.map(
    (length): Scenario => ({
      claim: 'steepest-by-length',
      of: 'own years',
      setting: `${length} years`,
      cases: 2000,
      run: (size) => steepestOfLength(length, size),
    }),
  ),
];
