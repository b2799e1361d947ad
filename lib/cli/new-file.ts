import { existsSync } from 'node:fs';
import { UsageError } from './usage-error.ts';

/** The file that --out names, which must not exist yet.
 *  @param word  what the usage calls it
 *  @throws UsageError when it does, or nothing is named */
export function newFile(out: string | undefined, word: string): string {
  if (!out) throw new UsageError(`Say where to with --out ${word}.`);
  if (existsSync(out)) throw new UsageError(`${out} exists already; give --out a new name.`);
  return out;
}
