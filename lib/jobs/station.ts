import type { Basis, BasisKey } from '../basis.ts';
import { verdict } from '../region/verdict.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { curvesOf } from './curves.ts';
import { minimaOf } from './minima.ts';
import { neighboursOf } from './neighbours.ts';
import { runTask } from './pool.ts';
import { rankingOf } from './ranking.ts';
import { checkAsRead, regionInputs, withInputs } from './region-inputs.ts';
import { resultKey } from './result-key.ts';
import { slopeLine } from './slope-line.ts';
import type { StationDetail, YearCoverage } from './types.ts';
import { yearStartOf } from './year-start.ts';

const COVERAGE_KEYS: readonly BasisKey[] = ['yearStart', 'season', 'days', 'maxMissingDays', 'exclude'];

/** All that a station's page shows, against its region under a basis; null when the region has no such station.
 *  @returns `key`: equal exactly when all that the page depends on is equal, good as an ETag */
export async function stationDetail(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  code: string,
): Promise<(StationDetail & { key: string }) | null> {
  const inputs = await regionInputs(region.id);
  const station = inputs.find(({ facts }) => facts.code === code)?.facts;
  if (!station) return null;
  const { ranking, key } = await rankingOf(region, basis);
  const [minima, curves, years] = await Promise.all([
    minimaOf(region, basis),
    curvesOf(region, basis),
    coverageOf(region, basis, code),
  ]);
  const row = ranking.rows.find((candidate) => candidate.code === code)!;
  return {
    station,
    basis: ranking.basis,
    row,
    ranked: ranking.counts.ranked,
    verdict: verdict(row, ranking.basis),
    minima: minima.stations.find((candidate) => candidate.station.code === code)!.minima,
    // under Drying the slope is one of days, and the minima are shown
    line: row.drying ? null : slopeLine(row),
    curve: curves.curves.find((candidate) => candidate.station.code === code) ?? null,
    noCurveReason: curves.leftOut.find((candidate) => candidate.station.code === code)?.reason ?? null,
    region: { unit: curves.unit, exceedances: curves.exceedances, band: curves.band },
    coverage: years?.coverage ?? [],
    neighbours: neighboursOf(code, ranking.rows),
    key: `${key}-${curves.key}`,
  };
}

/** How complete a station's record is, year by year; null when the region has no such station. */
export async function coverageOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  code: string,
): Promise<{ coverage: YearCoverage[]; yearStart: number; key: string } | null> {
  return withInputs(region.id, async (inputs) => {
    const input = inputs.find(({ facts }) => facts.code === code);
    if (!input) return null;
    const yearStart = await yearStartOf(inputs, basis);
    const { season, days, maxMissingDays, exclude } = basis;
    const options = { yearStart, season, days, maxMissingDays, exclude };
    const key = resultKey('coverage', { values: { ...basis, yearStart }, keys: COVERAGE_KEYS }, [input], 'none');
    const coverage = await cached('coverage', key, async () => {
      const { years, hash } = await runTask('coverage', { stationId: input.facts.id, options });
      checkAsRead([input], [hash]);
      return years;
    });
    return { coverage, yearStart, key };
  });
}
