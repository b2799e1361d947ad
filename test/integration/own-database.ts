import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { forgetResults } from '../../lib/jobs/cached.ts';
import { migrate } from '../../lib/store/migrate.ts';
import { closeStore } from '../../lib/store/open.ts';

/** A database of its own in a new folder. */
export interface OwnDatabase {
  folder: string;
  /** Closes it, takes it away and puts DATABASE_URL back; workers are the caller's to end. */
  giveBack(): Promise<void>;
}

/** Makes a database that DATABASE_URL names from now on.
 *  @param name  part of the folder's name, so that a folder left behind says from where */
export async function ownDatabase(name: string, { migrated = true } = {}): Promise<OwnDatabase> {
  const folder = mkdtempSync(join(tmpdir(), `hungerstone-${name}-`));
  const before = process.env.DATABASE_URL;
  process.env.DATABASE_URL = `file:${folder}/hungerstone.db`;
  if (migrated) await migrate();
  return {
    folder,
    async giveBack() {
      await forgetResults();
      await closeStore();
      rmSync(folder, { recursive: true, force: true });
      if (before === undefined) delete process.env.DATABASE_URL;
      else process.env.DATABASE_URL = before;
    },
  };
}
