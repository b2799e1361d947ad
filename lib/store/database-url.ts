import { resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { StoreError } from './errors.ts';

/** Everything runs from the project's root: the commands see to it, and so does Next. */
const projectRoot = (): string => process.cwd();

/** Absolute path of the database file.
 *  @param url  a `file:` URL, by default DATABASE_URL, else data/hungerstone.db; a relative one resolves against the
 *              project's root. `file:x.db`, `file:./x.db`, `file:/x.db` and `file:///x.db` are all understood.
 *  @throws StoreError 'bad-url' for anything but a file */
export function databasePath(url: string | undefined = process.env.DATABASE_URL): string {
  const root = projectRoot();
  if (url === undefined || url === '') return resolve(/* turbopackIgnore: true */ root, 'data', 'hungerstone.db');
  const rest = /^file:([^?#]+)/.exec(url)?.[1];
  if (rest === undefined || rest.includes(':memory:')) {
    throw new StoreError(
      'bad-url',
      `DATABASE_URL must be a file, such as file:./data/hungerstone.db, and is "${url}".`,
    );
  }
  if (rest.startsWith('//')) return fileURLToPath(`file:${rest}`);
  return resolve(/* turbopackIgnore: true */ root, decodeURIComponent(rest));
}

/** The URL by which Prisma's adapter opens a database file. */
export const databaseUrl = (path: string): string => pathToFileURL(path).href;

/** Folder of the migrations. */
export const migrationsFolder = (): string =>
  resolve(/* turbopackIgnore: true */ projectRoot(), 'prisma', 'migrations');
