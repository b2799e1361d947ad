import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { migrate } from '../../../lib/store/migrate.ts';
import { closeStore } from '../../../lib/store/open.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { sampleFiles } from '../jobs/sample-files.ts';

/** Gives the tests of a file one database with a region "Upper Wethe" of four stations, a layer and 30 years of flows
 *  each, made once: for tests that only read. */
export function importedRegion(): { readonly region: RegionRow; readonly folder: string } {
  const place = {} as { region: RegionRow; folder: string };
  const before = process.env.DATABASE_URL;
  beforeAll(async () => {
    place.folder = mkdtempSync(join(tmpdir(), 'hungerstone-region-'));
    process.env.DATABASE_URL = `file:${place.folder}/hungerstone.db`;
    await migrate();
    place.region = await createRegion({ name: 'Upper Wethe' });
    const { registry, layer, flows } = sampleFiles(`${place.folder}/given`);
    const files = [registry, layer, flows].map((path) => ({ path, name: basename(path) }));
    await (await launchImport({ region: { id: place.region.id }, files, choices: {} })).result;
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
