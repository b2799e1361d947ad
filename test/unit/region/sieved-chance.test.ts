import { describe, expect, test } from 'vitest';
import { chanceSeries, medianLag1 } from '../../../lib/region/chance-series.ts';
import { settledTrends } from '../../../lib/region/settled-trends.ts';
import { joinSums, type SievedStation, type SievedTask, sievedSums } from '../../../lib/region/sieved-chance.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { sieve, sieveResiduals, sieveTerms } from '../../../lib/statistics/sieve.ts';
import { countsByReplicate, type TrendBits } from '../../../lib/statistics/trend-bits.ts';
import { noiseRanking } from './noise-region.ts';

const STATIONS = 12;
const REGION = { stations: STATIONS, years: 40, lag1: 0.5, shared: 0.4 };
type Correction = SievedTask['basis']['serialCorrection'];

function drawn(serialCorrection: Correction, replicates: number): SievedTask & { critical: Float64Array } {
  const ranking = noiseRanking(REGION, 'sieve', { serialCorrection });
  const series = chanceSeries(ranking.rows, ranking.basis);
  const stations = series.codes.map(
    (code, i): SievedStation => ({
      code,
      // one station with a gap
      years: Array.from(series.years).filter((year) => i !== 3 || year % 9 !== 0),
      values: Array.from(series.series[i]).filter((_, place) => i !== 3 || series.years[place] % 9 !== 0),
      slope: series.slopes[i],
    }),
  );
  const terms = sieveTerms(
    stations.map(({ years }) => years),
    medianLag1(series.lag1) ?? 0,
  );
  const { corrected: critical } = series;
  return { stations, terms, basis: { alpha: 0.1, serialCorrection }, replicates, seed: 'test', critical };
}

function settled({ critical, ...task }: ReturnType<typeof drawn>): TrendBits {
  const lengths = task.stations.map(({ years }) => years.length);
  return settledTrends({ sums: sievedSums(task), lengths, critical, basis: task.basis });
}

/** Share of stations and replicates that fall or rise. */
function share(task: ReturnType<typeof drawn>): number {
  const { falling, rising } = countsByReplicate(settled(task), [...task.stations.keys()]);
  const sum = (counts: Uint32Array) => counts.reduce((total, count) => total + count, 0);
  return (sum(falling) + sum(rising)) / (task.stations.length * task.replicates);
}

describe('the sieve', () => {
  test.each(['ar1', 'ar1-regional', 'pre-whitened', 'none'] as const)(
    'is tested under %s as the ranking would test the region of each replicate',
    (correction) => {
      const task = drawn(correction, 30);
      const made = sieve(task.terms, task.seed, task.replicates);
      const replicates = task.stations.map(({ code, ...line }) => ({
        years: line.years,
        of: made.of({ years: line.years, residuals: sieveResiduals(line) }, code)!,
      }));
      const bits = settled(task);
      for (let b = 0; b < task.replicates; b++) {
        const family = replicates.map(({ years, of }) => {
          const replicate = new Float64Array(of.length);
          of.next(replicate);
          return { years, values: years.map((year) => replicate[year - years[0]]) };
        });
        const signs = trendFamily(family, correction).map(({ p, z }) => (p < 0.1 ? Math.sign(z) : 0));
        const found = task.stations.map((_, i) => {
          const counts = countsByReplicate(bits, [i]);
          return counts.rising[b] - counts.falling[b];
        });
        // the critical S of station 3 is that of its whole record, which has no gap: it is taken anew only with a correlation
        const compared = (list: number[]) => list.filter((_, i) => correction !== 'none' || i !== 3);
        expect(compared(found)).toEqual(compared(signs.map((sign) => sign + 0)));
      }
      expect(share(task)).toBeGreaterThan(0);
    },
  );

  test('carries over: a test without correction finds trends in far more than alpha of the replicates, one with it does not', () => {
    // false alarms at 10 % and a lag-1 correlation of 0.5 without correction: about a third
    expect(share(drawn('none', 300))).toBeGreaterThan(0.2);
    expect(share(drawn('ar1-regional', 300))).toBeLessThan(0.2);
    expect(share(drawn('ar1-regional', 300))).toBeGreaterThan(0.05);
  });

  test('gives stations in parts what it gives them together', () => {
    const task = drawn('ar1', 50);
    const part = (from: number, to: number) => sievedSums({ ...task, stations: task.stations.slice(from, to) });
    expect(joinSums([part(0, 4), part(4, 5), part(5, STATIONS)])).toEqual(sievedSums(task));
    expect(joinSums([])).toMatchObject({ stations: 0, replicates: 0 });
  });

  test('knows no trend: a slope laid under a station changes nothing', () => {
    const task = drawn('ar1', 200);
    const stations = task.stations.map((station) => ({
      ...station,
      values: station.values.map((value, i) => value + 0.5 * (station.years[i] - 2000)),
      slope: station.slope + 0.5,
    }));
    expect(Math.abs(share(task) - share({ ...task, stations }))).toBeLessThan(0.002);
  });

  test('says nothing of a station without three pairs of consecutive years', () => {
    const task = drawn('ar1', 20);
    const sparse = { ...task.stations[0], years: [1981, 1983, 1985, 1987], values: [1, 2, 3, 4], slope: 0.5 };
    const { falling, rising } = settled({ ...task, stations: [sparse] });
    expect([...falling, ...rising].every((word) => word === 0)).toBe(true);
  });
});
