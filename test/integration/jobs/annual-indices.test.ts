import { basename } from 'node:path';
import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { type AnnualIndexName, INDICES, parseBasis } from '../../../lib/basis.ts';
import { forgetResults, settleResults } from '../../../lib/jobs/cached.ts';
import { commonPeriodsOf } from '../../../lib/jobs/common-periods.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { stationDetail } from '../../../lib/jobs/station.ts';
import { annualIndex } from '../../../lib/lowflow/annual-index.ts';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { DailySeries } from '../../../lib/series/daily-series.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { readSeries } from '../../../lib/store/records.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { sampleFiles } from './sample-files.ts';

const place = temporaryDatabase();
let region: RegionRow;
afterAll(closePool);
afterEach(forgetResults);
beforeEach(async () => {
  const { registry, flows } = sampleFiles(`${place.folder}/given`);
  region = await createRegion({ name: 'Upper Wethe' });
  const files = [registry, flows].map((path) => ({ path, name: basename(path) }));
  await (await launchImport({ region: { id: region.id }, files, choices: {} })).result;
}, 60_000);

const basisBy = (index: AnnualIndexName) => parseBasis({ index, yearStart: 5 });

/** The same by the pure functions alone, in this thread. */
async function rankedHere(index: AnnualIndexName) {
  const basis = basisBy(index);
  const options = { ...basis, yearStart: 5 };
  const stations = await listStations(region.id);
  const series = new Map<number, DailySeries>();
  readSeries(
    stations.map(({ id }) => id),
    (id, one) => series.set(id, one),
  );
  const given = stations.map((station) => {
    const one = series.get(station.id)!;
    const minima = annualMinima(one, options);
    const isFromRecord = index === 'q95' || index === 'bfi' || index === 'deficit';
    return isFromRecord ? { station, minima, figures: annualIndex(one, minima, index, options) } : { station, minima };
  });
  return rankRegion(given, basis, 5);
}

test('rankingOf by each index equals what the pure functions make of the same records', async () => {
  for (const index of INDICES) {
    const { ranking } = await rankingOf(region, basisBy(index));
    expect(ranking, index).toEqual(await rankedHere(index));
    expect(ranking.rows).toHaveLength(4);
    // nothing ever dries up here
    expect(ranking.counts.ranked, index).toBe(index === 'zero-flow-days' ? 0 : 4);
    for (const row of ranking.rows) expect(row.index).toBe(index);
  }
});

test('A1, of which all flows fall, falls by every flow and has larger deficits', async () => {
  for (const index of ['minimum', 'q95', 'mean-flow', 'deficit'] as const) {
    const { ranking } = await rankingOf(region, basisBy(index));
    expect(ranking.rows[0], index).toMatchObject({ code: 'A1', rank: 1, trend: 'falling' });
    expect(Math.sign(ranking.rows[0].valueSlope!), index).toBe(index === 'deficit' ? 1 : -1);
  }
});

test('the common period in the counts of all periods is the one of the ranking, whatever is compared', async () => {
  for (const index of INDICES) {
    const { ranking } = await rankingOf(region, basisBy(index));
    const { periods } = await commonPeriodsOf(region, basisBy(index));
    expect(periods.common, index).toEqual(ranking.basis.period);
  }
});

test('daily flows are read anew for an index only where the minima do not bring it along', async () => {
  const kindsAfter = async (index: AnnualIndexName) => {
    await rankingOf(region, { ...basisBy(index), days: 11 });
    await settleResults();
    const connection = openConnection(place.path);
    const kinds = (rows(connection, 'SELECT kind FROM Result').all([]) as [string][]).flat();
    connection.close();
    return kinds.filter((kind) => kind === 'annual-index').length;
  };
  const before = await kindsAfter('mean-flow');
  expect(await kindsAfter('minimum-date')).toBe(before);
  expect(await kindsAfter('bfi')).toBe(before + 1);
});

test('stationDetail speaks of what is compared, and draws its line in its own unit', async () => {
  const detail = (await stationDetail(region, basisBy('deficit'), 'A1'))!;
  expect(detail.verdict).toMatch(/^Larger deficits: the deficit volume below Q90 gained \d+ % of its mean per decade/);
  const [first, last] = detail.line!.fitted;
  expect(last - first).toBeCloseTo((detail.row.valueSlope! / 10) * (detail.row.lastYear! - detail.row.firstYear!), 0);
});
