import { join } from 'node:path';
import { afterEach, beforeEach } from 'vitest';
import { type OwnDatabase, ownDatabase } from '../own-database.ts';

/** Gives every test of a file a new database of its own in a folder of its own, and takes both away afterwards. */
export function temporaryDatabase({ migrated = true } = {}): { readonly path: string; readonly folder: string } {
  const place = { path: '', folder: '' };
  let database: OwnDatabase | undefined;
  beforeEach(async () => {
    database = await ownDatabase('store', { migrated });
    place.folder = database.folder;
    place.path = join(place.folder, 'hungerstone.db');
  });
  afterEach(() => database?.giveBack());
  return place;
}
