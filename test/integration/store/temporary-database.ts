import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach } from 'vitest';
import { migrate } from '../../../lib/store/migrate.ts';
import { closeStore } from '../../../lib/store/open.ts';

/** Gives every test of a file a new database of its own in a folder of its own, and takes both away afterwards. */
export function temporaryDatabase({ migrated = true } = {}): { readonly path: string; readonly folder: string } {
  const place = { path: '', folder: '' };
  const before = process.env.DATABASE_URL;
  beforeEach(async () => {
    place.folder = mkdtempSync(join(tmpdir(), 'hungerstone-store-'));
    place.path = join(place.folder, 'hungerstone.db');
    process.env.DATABASE_URL = `file:${place.path}`;
    if (migrated) await migrate();
  });
  afterEach(async () => {
    await closeStore();
    rmSync(place.folder, { recursive: true, force: true });
    if (before === undefined) delete process.env.DATABASE_URL;
    else process.env.DATABASE_URL = before;
  });
  return place;
}
