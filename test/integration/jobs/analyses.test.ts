import { basename } from 'node:path';
import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { parseBasis } from '../../../lib/basis.ts';
import { STANDARD_EXCEEDANCES } from '../../../lib/curves/exceedances.ts';
import { forgetResults, settleResults } from '../../../lib/jobs/cached.ts';
import { curvesOf } from '../../../lib/jobs/curves.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { minimaOf } from '../../../lib/jobs/minima.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { coverageOf, stationDetail } from '../../../lib/jobs/station.ts';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { resolveYearStart } from '../../../lib/region/year-start.ts';
import type { DailySeries } from '../../../lib/series/daily-series.ts';
import { monthlyRegime } from '../../../lib/series/monthly-regime.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { readSeries } from '../../../lib/store/records.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { longRows, type SampleFiles, sampleFiles } from './sample-files.ts';

const place = temporaryDatabase();
afterAll(closePool);

let files: SampleFiles;
let region: RegionRow;
afterEach(forgetResults);
beforeEach(async () => {
  files = sampleFiles(`${place.folder}/given`);
  region = await createRegion({ name: 'Upper Wethe' });
  await take(files.registry, files.flows);
}, 60_000);

async function take(...paths: string[]): Promise<void> {
  const given = paths.map((path) => ({ path, name: basename(path) }));
  await (await launchImport({ region: { id: region.id }, files: given, choices: { revise: true } })).result;
}

/** The same by the pure functions alone, in this thread. */
async function rankedHere(basis = region.basis) {
  const stations = await listStations(region.id);
  const series = new Map<number, DailySeries>();
  readSeries(
    stations.map(({ id }) => id),
    (id, one) => series.set(id, one),
  );
  const regimes = [...series.values()].map((one) => monthlyRegime(one, basis.exclude));
  const yearStart = basis.yearStart === 'auto' ? resolveYearStart(regimes) : basis.yearStart;
  const minima = stations.map((station) => ({
    station,
    minima: annualMinima(series.get(station.id)!, { ...basis, yearStart }),
  }));
  return { ranking: rankRegion(minima, basis, yearStart), minima };
}

test('rankingOf equals what the pure functions make of the same records', async () => {
  const { ranking } = await rankingOf(region, region.basis);
  expect(ranking).toEqual((await rankedHere()).ranking);
  expect(ranking.rows[0]).toMatchObject({ code: 'A1', rank: 1 });
  expect(ranking.rows[0].percentPerDecade).toBeLessThan(-10);
});

test('minimaOf equals what the pure functions make of the same records, for a month that is given as well', async () => {
  for (const yearStart of ['auto', 1, 10] as const) {
    const basis = parseBasis({ yearStart, days: 30 });
    expect((await minimaOf(region, basis)).stations).toEqual((await rankedHere(basis)).minima);
  }
});

test('a result is computed once for all who ask at the same time, and is the same from memory and from the store', async () => {
  const asked = await Promise.all([rankingOf(region, region.basis), rankingOf(region, region.basis)]);
  expect(asked[0]).toEqual(asked[1]);
  await settleResults();
  const connection = openConnection(place.path);
  const kinds = (rows(connection, 'SELECT kind FROM Result ORDER BY kind').all([]) as [string][]).flat();
  connection.close();
  expect(kinds).toEqual(['minima', 'ranking', 'regimes']);
  await forgetResults();
  await closePool();
  expect(await rankingOf(region, region.basis)).toEqual(asked[0]);
});

test('the key of a ranking changes with records, marks and facts, and with the basis keys that it reads', async () => {
  const { key, ranking } = await rankingOf(region, region.basis);
  expect((await rankingOf(region, parseBasis({ normalise: 'mean', units: 'us' }))).key).toBe(key);
  const seen = new Set([key]);
  const isNew = async (basis = region.basis) => {
    const next = await rankingOf(region, basis);
    expect(seen.has(next.key)).toBe(false);
    seen.add(next.key);
    return next.ranking;
  };
  await isNew(parseBasis({ alpha: 0.05 }));

  const [{ id }] = await listStations(region.id);
  await addMark({ stationId: id, kind: 'reject', firstDay: 4000, lastDay: 4100, reason: 'ice jam', by: 'test' });
  const marked = await isNew();
  expect(marked.rows.find(({ code }) => code === 'A1')!.yearsUsed).toBe(ranking.rows[0].yearsUsed - 1);

  await take(files.write('area.csv', 'station_id,name,drainage_area_km2\nC3,Cedar Weir,90\n'));
  await isNew();
  await take(files.write('more.csv', 'station,date,discharge_m3s\nD4,2010-01-01,1.5\n'));
  await isNew();
});

test('a basis that says only how numbers are shown stands in the answer and computes nothing anew', async () => {
  await rankingOf(region, region.basis);
  const { ranking } = await rankingOf(region, parseBasis({ normalise: 'median', units: 'us' }));
  expect(ranking.basis).toMatchObject({ normalise: 'median', units: 'us' });
});

test('curvesOf gives every station a curve on some scale, or a reason', async () => {
  const byArea = await curvesOf(region, region.basis);
  expect(byArea.unit).toBe('L/s/km²');
  expect(byArea.curves.map(({ station }) => station.code)).toEqual(['A1', 'B2', 'C3']);
  expect(byArea.leftOut.map(({ station }) => station.code)).toEqual(['D4']);
  expect(byArea.leftOut[0].reason).toMatch(/drainage area/);
  const asMeasured = await curvesOf(region, parseBasis({ normalise: 'none' }));
  expect(asMeasured.curves).toHaveLength(4);
  const at = STANDARD_EXCEEDANCES.indexOf(0.5);
  const [measured, specific] = [asMeasured, byArea].map(({ curves }) => curves[0].flows[at]);
  expect(specific).toBeCloseTo((measured * 1000) / 120, 9);
  expect(byArea.key).not.toBe(asMeasured.key);
});

test('curvesOf of a typical year differs from the curve of all days, and rests on the same years', async () => {
  const [period, median] = await Promise.all([
    curvesOf(region, region.basis, 'period'),
    curvesOf(region, region.basis, 'median-annual'),
  ]);
  expect(median.kind).toBe('median-annual');
  expect(median.curves[0].years).toBe(period.curves[0].years);
  expect(median.curves[0].flows).not.toEqual(period.curves[0].flows);
});

test('stationDetail gathers what a page shows, and is null for a station that is not there', async () => {
  const detail = (await stationDetail(region, region.basis, 'A1'))!;
  expect(detail.row.code).toBe('A1');
  expect(detail.verdict).toMatch(/^Falling: the 7-day minimum lost/);
  expect(detail.line!.fitted[0]).toBeGreaterThan(detail.line!.fitted[1]);
  expect(detail.curve!.flows).toHaveLength(STANDARD_EXCEEDANCES.length);
  expect(detail.neighbours.map(({ station }) => station.code)).toEqual(['B2', 'C3', 'D4']);
  expect(detail.coverage.filter(({ state }) => state === 'usable')).toHaveLength(detail.row.yearsUsed);
  const spring = (await stationDetail(region, region.basis, 'D4'))!;
  expect(spring.curve).toBeNull();
  expect(spring.noCurveReason).toMatch(/drainage area/);
  expect(await stationDetail(region, region.basis, 'Z9')).toBeNull();
});

test('coverageOf counts missing and flagged days of each year', async () => {
  const some = longRows(['A1']).filter((row) => !row.includes(',2005-07'));
  const flagged = some.map((row) => `${row},${row.includes(',2006-0') ? 'P' : 'A'}`);
  const fresh = await createRegion({ name: 'Fresh' });
  const path = files.write('flagged.csv', `station,date,discharge_m3s,flag\n${flagged.join('\n')}\n`);
  const given = [{ path, name: 'flagged.csv' }];
  await (await launchImport({ region: { id: fresh.id }, files: given, choices: {} })).result;
  const { coverage } = (await coverageOf(fresh, parseBasis({ yearStart: 1 }), 'A1'))!;
  expect(coverage.find(({ year }) => year === 2004)).toMatchObject({ state: 'usable', days: 366, missingDays: 0 });
  expect(coverage.find(({ year }) => year === 2005)).toMatchObject({ state: 'partial', days: 365, missingDays: 31 });
  expect(coverage.find(({ year }) => year === 2006)).toMatchObject({ state: 'partial', missingDays: 273 });
  expect(coverage.find(({ year }) => year === 2006)!.flagged.provisional).toBe(273);
});

test('a season that does not fit into the year that auto came to is refused by name', async () => {
  const { ranking } = await rankingOf(region, region.basis);
  const before = ((ranking.basis.yearStart + 10) % 12) + 1;
  const basis = parseBasis({ season: [before, ranking.basis.yearStart] });
  await expect(rankingOf(region, basis)).rejects.toThrow(/season/);
});

test('a region without stations ranks none', async () => {
  const empty = await createRegion({ name: 'Empty' });
  const { ranking } = await rankingOf(empty, empty.basis);
  expect(ranking.rows).toEqual([]);
  expect((await curvesOf(empty, empty.basis)).curves).toEqual([]);
});
