import { existsSync } from 'node:fs';
import { restore } from '../../store/backup.ts';
import { readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone restore FILE

Puts a backup in the place of the database. Stop the server first: while one runs nothing is changed.
`;

/** The database as it stands may be broken or absent: nothing of it is opened first. */
export const withoutDatabase = true;

export async function run(argv: string[]): Promise<number> {
  const { positionals } = readArguments(argv, {}, { name: 'FILE', min: 1, max: 1 });
  const [file] = positionals;
  if (!existsSync(file)) throw new UsageError(`${file} does not exist; give a file that backup wrote.`);
  await restore(file);
  process.stderr.write(`The database is as it was when ${file} was written.\n`);
  return 0;
}
