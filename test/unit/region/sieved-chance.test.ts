import { describe, expect, test } from 'vitest';
import { chanceSeries, medianLag1 } from '../../../lib/region/chance-series.ts';
import { type SievedStation, sievedChance } from '../../../lib/region/sieved-chance.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { sieve, sieveResiduals, sieveTerms } from '../../../lib/statistics/sieve.ts';
import { countsByReplicate, joinTrendBits } from '../../../lib/statistics/trend-bits.ts';
import { noiseRanking } from './noise-region.ts';

const REGION = { stations: 10, years: 40, lag1: 0.5, shared: 0.4 };
type Correction = Parameters<typeof sievedChance>[0]['basis']['serialCorrection'];

function taskOf(serialCorrection: Correction, replicates = 400) {
  const ranking = noiseRanking(REGION, 'sieve', { serialCorrection });
  const series = chanceSeries(ranking.rows, ranking.basis);
  const stations = series.codes.map((code, i): SievedStation => {
    const [slope, critical] = [series.slopes[i], series.corrected[i]];
    return { code, years: Array.from(series.years), values: Array.from(series.series[i]), slope, critical };
  });
  const terms = sieveTerms(
    stations.map(({ years }) => years),
    medianLag1(series.lag1) ?? 0,
  );
  return { stations, terms, basis: { alpha: 0.1, serialCorrection }, replicates, seed: 'test' };
}

const members = Array.from({ length: REGION.stations }, (_, i) => i);

/** Share of stations and replicates that fall or rise. */
function share(task: Parameters<typeof sievedChance>[0]): number {
  const { falling, rising } = countsByReplicate(sievedChance(task), members);
  const sum = (counts: Uint32Array) => counts.reduce((total, count) => total + count, 0);
  return (sum(falling) + sum(rising)) / (members.length * task.replicates);
}

describe('sievedChance', () => {
  test('carries over: a test without correction finds trends in far more than alpha of its replicates, one with it does not', () => {
    // false alarms at 10 % and a lag-1 correlation of 0.5 without correction: about a third
    expect(share(taskOf('none'))).toBeGreaterThan(0.2);
    expect(share(taskOf('ar1-regional'))).toBeLessThan(0.16);
    expect(share(taskOf('ar1-regional'))).toBeGreaterThan(0.04);
  });

  test('tests every replicate as the ranking would under pre-whitened', () => {
    const task = taskOf('pre-whitened', 40);
    const made = sieve(task.terms, task.seed, task.replicates);
    const [{ code, years, values, slope }] = task.stations;
    const replicates = made.of({ years, residuals: sieveResiduals({ years, values, slope }) }, code)!;
    const { falling, rising } = countsByReplicate(sievedChance(task), [0]);
    for (let b = 0; b < task.replicates; b++) {
      const replicate = new Float64Array(replicates.length);
      replicates.next(replicate);
      const [{ p, z }] = trendFamily([{ years, values: [...replicate] }], 'pre-whitened');
      expect([falling[b], rising[b]]).toEqual([p < 0.1 && z < 0 ? 1 : 0, p < 0.1 && z > 0 ? 1 : 0]);
    }
    expect(falling.some((count) => count > 0)).toBe(true);
  });

  test('gives stations in parts what it gives them together', () => {
    const task = taskOf('ar1');
    const part = (from: number, to: number) => sievedChance({ ...task, stations: task.stations.slice(from, to) });
    expect(joinTrendBits([part(0, 4), part(4, 5), part(5, 10)])).toEqual(sievedChance(task));
  });

  test('knows no trend: a slope laid under a station changes nothing', () => {
    const task = taskOf('ar1');
    const sloped = task.stations.map((station) => ({
      ...station,
      values: station.values.map((value, i) => value + 0.5 * (station.years[i] - 2000)),
      slope: station.slope + 0.5,
    }));
    const [level, steep] = [share(task), share({ ...task, stations: sloped })];
    expect(Math.abs(level - steep)).toBeLessThan(0.002);
  });

  test('says nothing of a station without three pairs of consecutive years', () => {
    const task = taskOf('ar1');
    const sparse = {
      ...task.stations[0],
      years: [1981, 1983, 1985, 1987],
      values: [1, 2, 3, 4],
      slope: 0.5,
      critical: 1,
    };
    const { falling, rising } = sievedChance({ ...task, stations: [sparse] });
    expect([...falling, ...rising].every((word) => word === 0)).toBe(true);
  });
});
