import { mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, expect } from 'vitest';
import { isoDate } from '../../../lib/calendar/day.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import type { FileChoices, ImportChoices, ImportOutcome, ImportProblem } from '../../../lib/jobs/import-types.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { readParts } from '../../../lib/store/parts.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { type OwnDatabase, ownDatabase } from '../own-database.ts';
import { databaseContent } from './database-content.ts';

export type Content = string | Uint8Array;

/** Stations in the west, where longitudes are below −90 and cannot be latitudes. */
const REGISTRY = `station_id,name,latitude,longitude,drainage_area_km2
A1,Alder Mill,50.1,-107.1,120
0102,Birch Ford,50.2,-107.2,340
AB7,Cedar Weir,50.3,-107.3,80
`;

/** Gives the tests of a file one database with a region "Upper Wethe" that has three stations and no flows yet. */
export function registeredRegion(): { readonly region: RegionRow; readonly folder: string } {
  const place = {} as { region: RegionRow; folder: string };
  let database: OwnDatabase | undefined;
  beforeAll(async () => {
    database = await ownDatabase('bad');
    place.folder = database.folder;
    mkdirSync(join(place.folder, 'given'));
    place.region = await createRegion({ name: 'Upper Wethe' });
    await importOne(place, 'stations.csv', REGISTRY);
  });
  afterAll(async () => {
    await closePool();
    await database?.giveBack();
  });
  return place;
}

type Place = ReturnType<typeof registeredRegion>;

/** Imports one file, and answers what came of it, also when it was refused. */
export async function importOne(
  { region, folder }: Place,
  name: string,
  content: Content,
  answer: FileChoices = {},
  choices: ImportChoices = {},
): Promise<ImportOutcome> {
  const path = join(folder, 'given', String(readdirSync(join(folder, 'given')).length));
  writeFileSync(path, content);
  const files = [{ path, name }];
  const order = { region: { id: region.id }, files, choices: { ...choices, files: { [name]: answer } } };
  const { result } = await launchImport(order);
  return result.catch((error: { result?: ImportOutcome }) => {
    if (!error.result) throw error;
    return error.result;
  });
}

/** Expects a file to be refused in words that say all there is to say, and to leave the database, and what lies beside it,
 *  as they were. */
export async function refusalOf(
  place: Place,
  name: string,
  content: Content,
  answer: FileChoices = {},
): Promise<ImportProblem> {
  const before = databaseContent(databasePath());
  const { taken, problems } = await importOne(place, name, content, answer);
  expect(taken).toEqual([]);
  expect(problems).toHaveLength(1);
  const [refused] = problems;
  expect(refused.file).toBe(name);
  expect(refused.message.startsWith(name)).toBe(true);
  expect(refused.message).not.toContain(place.folder);
  const { row, value, remedy } = refused.problem ?? expect.fail('a refusal must say what is wrong');
  expect(remedy.length).toBeGreaterThan(10);
  expect(refused.message).toContain(remedy);
  if (row !== undefined) expect(refused.message).toContain(`row ${row}`);
  if (value !== undefined) expect(refused.message).toContain(`“${value}”`);
  expect(databaseContent(databasePath()) === before).toBe(true);
  expect(readdirSync(place.folder).filter((file) => /\.(?:upload|staging)-/.test(file))).toEqual([]);
  return refused;
}

/** The values that are stored of a station, as written: ISO date → value, NaN where it is missing. */
export async function storedDays({ region }: Place, code: string): Promise<Record<string, number>> {
  const station = (await getStation(region.id, code)) ?? expect.fail(`no station ${code}`);
  const days: Record<string, number> = {};
  for (const { firstDay, values, codes } of readParts(station.id)) {
    for (const [at, value] of values.entries()) if (codes[at] !== 255) days[isoDate(firstDay + at)] = value;
  }
  return days;
}
