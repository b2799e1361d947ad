import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { dateOfDay, dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { migrate } from '../../../lib/store/migrate.ts';
import { closeStore } from '../../../lib/store/open.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { seeded } from '../../seeded.ts';

export const FIRST_YEAR = 1990;
export const LAST_YEAR = 2019;
const FIRST_DAY = dayNumber(FIRST_YEAR, 1, 1);
const LAST_DAY = dayNumber(LAST_YEAR, 12, 31);

const yearOf = (day: number): number => dateOfDay(day).year;

/** A made-up daily flow, in m³/s; null where the record has a day and no value. */
type Flow = (day: number) => number | null;

const equal: Flow = () => 2.5;
const zero: Flow = () => 0;
const none: Flow = () => null;
/** 3 m³/s until the year, 2 from it on. */
const stepIn =
  (year: number): Flow =>
  (day) =>
    yearOf(day) < year ? 3 : 2;
/** 2 and 3 m³/s by turns, year by year. */
const byTurns: Flow = (day) => 2 + (yearOf(day) % 2);

/** Wet in spring, low in autumn, another level every year, and a slow change. */
function river(seed: number, drift: number): Flow {
  const draw = seeded(seed);
  const level = Array.from({ length: LAST_YEAR - FIRST_YEAR + 1 }, () => 0.8 + 0.4 * draw());
  return (day) => {
    const year = (day - FIRST_DAY) / 365.25;
    const season = 1.2 + Math.cos(2 * Math.PI * (year - 0.25));
    return season * level[yearOf(day) - FIRST_YEAR] * (1 + drift * (year - 15));
  };
}

/** Every region by its slug, with the flows of its stations. Stations A1, B2, … have coordinates; the last has no area. */
const REGIONS: Record<string, readonly Flow[]> = {
  'all-equal': [equal, equal, equal],
  'all-zero': [zero, zero, zero],
  'two-values': [stepIn(2005), byTurns, stepIn(2018)],
  'no-values': [none, none],
  'one-station': [river(1, -0.02)],
  'two-stations': [river(2, -0.02), river(3, 0)],
  mixed: [river(4, -0.02), equal, zero, none, stepIn(2005), river(5, 0)],
};
export const ODD_REGIONS = Object.keys(REGIONS);

/** The codes of a region's stations: A1, B2, … */
export const codesOf = (slug: string): string[] =>
  REGIONS[slug].map((_, i) => `${String.fromCharCode(65 + i)}${i + 1}`);

const nameOf = (slug: string) => slug.replaceAll('-', ' ');

function registry(slug: string): string {
  const rows = codesOf(slug).map((code, i) => {
    const area = i === 2 ? '' : 100 + 10 * i;
    return `${code},Weir ${i + 1},50.${i + 1},7.${i + 1},${area},natural`;
  });
  return ['station_id,name,latitude,longitude,drainage_area_km2,influence', ...rows, ''].join('\n');
}

function flows(slug: string): string {
  const rows = ['station,date,discharge_m3s'];
  codesOf(slug).forEach((code, i) => {
    for (let day = FIRST_DAY; day <= LAST_DAY; day += 1) {
      rows.push(`${code},${isoDate(day)},${REGIONS[slug][i](day)?.toFixed(3) ?? ''}`);
    }
  });
  return `${rows.join('\n')}\n`;
}

/** Rain at A1: every tenth day, a little more in some years. */
function rain(): string {
  const rows = ['station,date,depth'];
  for (let day = FIRST_DAY; day <= LAST_DAY; day += 1) {
    rows.push(`A1,${isoDate(day)},${day % 10 === 0 ? 5 + ((yearOf(day) * 7) % 5) : 0}`);
  }
  return `${rows.join('\n')}\n`;
}

/** Gives the tests of a file one database with regions whose stations hold next to nothing, made once. */
export function oddRegions(): { readonly folder: string; readonly regions: Record<string, RegionRow> } {
  const place = { folder: '', regions: {} as Record<string, RegionRow> };
  const before = process.env.DATABASE_URL;
  beforeAll(async () => {
    place.folder = mkdtempSync(join(tmpdir(), 'hungerstone-odd-'));
    process.env.DATABASE_URL = `file:${place.folder}/hungerstone.db`;
    await migrate();
    for (const slug of ODD_REGIONS) place.regions[slug] = await importRegion(place.folder, slug);
  }, 60_000);
  afterAll(async () => {
    await forgetResults();
    await closePool();
    await closeStore();
    rmSync(place.folder, { recursive: true, force: true });
    if (before === undefined) delete process.env.DATABASE_URL;
    else process.env.DATABASE_URL = before;
  });
  return place;
}

async function importRegion(folder: string, slug: string): Promise<RegionRow> {
  const region = await createRegion({ name: nameOf(slug) });
  const given = join(folder, slug);
  mkdirSync(given);
  const take = async (contents: Record<string, string>, choices = {}) => {
    const files = Object.entries(contents).map(([name, text]) => {
      writeFileSync(join(given, name), text);
      return { path: join(given, name), name };
    });
    await (await launchImport({ region: { id: region.id }, files, choices })).result;
  };
  await take({ 'stations.csv': registry(slug), 'flows.csv': flows(slug) });
  if (slug === 'two-stations' || slug === 'mixed') {
    const mapping = { quantity: 'rainfall' as const, unit: 'mm' as const, value: { column: 'depth' } };
    await take({ 'rain.csv': rain() }, { all: { mapping } });
  }
  return region;
}
