import { existsSync } from 'node:fs';
import { backup } from '../../store/backup.ts';
import { readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone backup --out FILE

Writes the whole database to one new file, also while a server is running.

  --out FILE   must not exist yet
`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, { out: { type: 'string' } });
  if (!values.out) throw new UsageError('Say where to with --out FILE.');
  if (existsSync(values.out)) throw new UsageError(`${values.out} exists already; give --out a new name.`);
  await backup(values.out);
  process.stderr.write(`The database is in ${values.out}.\n`);
  return 0;
}
