import { createHash } from 'node:crypto';
import { readFile, stat } from 'node:fs/promises';
import { readHead } from './file-blocks.ts';
import { decodeText, hasUtf8Mark, refuseUnlessText, refuseUnlessUtf8 } from './text-encoding.ts';
import { IntakeError } from './types.ts';

/** The text of a small file (a registry, a layer), checked and decoded.
 *  @param mostBytes  larger files are refused: they are held in memory whole
 *  @throws IntakeError when it is empty, too large, not text, or not what its mark says */
export async function readWholeText(
  path: string,
  file: string,
  mostBytes: number,
): Promise<{ text: string; sha256: string }> {
  const head = await readHead(path, file);
  refuseUnlessText(head.bytes, file);
  if ((await stat(path)).size > mostBytes) {
    throw new IntakeError({
      file,
      value: `${Math.round(head.size / 1e6)} MB`,
      message: `the file is larger than ${Math.round(mostBytes / 1e6)} MB`,
      remedy: 'Check that it is the right file; simplify or split it',
    });
  }
  const bytes = await readFile(path);
  const start = hasUtf8Mark(bytes) ? 3 : 0;
  if (start > 0) refuseUnlessUtf8(bytes.subarray(start), 1, file);
  return { text: decodeText(bytes, start), sha256: createHash('sha256').update(bytes).digest('hex') };
}
