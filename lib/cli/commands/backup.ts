import { backup } from '../../store/backup.ts';
import { readArguments } from '../arguments.ts';
import { newFile } from '../new-file.ts';

export const usage = `Usage: npx hungerstone backup --out FILE

Writes the whole database to one new file, also while a server is running.

  --out FILE   must not exist yet
`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, { out: { type: 'string' } });
  const out = newFile(values.out, 'FILE');
  await backup(out);
  process.stderr.write(`The database is in ${out}.\n`);
  return 0;
}
