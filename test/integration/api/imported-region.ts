import { basename } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { sampleFiles } from '../jobs/sample-files.ts';
import { type OwnDatabase, ownDatabase } from '../own-database.ts';

/** Gives the tests of a file one database with a region "Upper Wethe" of four stations, a layer and 30 years of flows
 *  each, made once: for tests that only read. */
export function importedRegion(): { readonly region: RegionRow; readonly folder: string } {
  const place = {} as { region: RegionRow; folder: string };
  let database: OwnDatabase | undefined;
  beforeAll(async () => {
    database = await ownDatabase('region');
    place.folder = database.folder;
    place.region = await createRegion({ name: 'Upper Wethe' });
    const { registry, layer, flows } = sampleFiles(`${place.folder}/given`);
    const files = [registry, layer, flows].map((path) => ({ path, name: basename(path) }));
    await (await launchImport({ region: { id: place.region.id }, files, choices: {} })).result;
  }, 60_000);
  afterAll(async () => {
    await closePool();
    await database?.giveBack();
  });
  return place;
}
