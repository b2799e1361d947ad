import { rm } from 'node:fs/promises';
import { expandArchives } from '../intake/archive/index.ts';
import { IntakeError } from '../intake/types.ts';
import type { GivenFile } from './import-types.ts';
import { uploadLimit } from './upload-limit.ts';
import type { PreviewProblem } from './upload-types.ts';

/** The files of an upload with those of its archives in their place. */
export interface UnpackedUpload {
  files: GivenFile[];
  /** by name: archives that cannot be taken, and why */
  broken: Record<string, PreviewProblem>;
  /** what was passed over in the archives */
  notes: string[];
}

/** Unpacks the archives among files that were received. One that cannot be taken stays as it is and says why: the files
 *  beside it are none the worse for it. */
export async function unpackUpload(given: readonly GivenFile[], folder: string): Promise<UnpackedUpload> {
  const files: GivenFile[] = [];
  const broken: [string, PreviewProblem][] = [];
  const notes: string[] = [];
  for (const file of given) {
    try {
      const unpacked = await expandArchives([file], folder, { mostBytes: uploadLimit() });
      files.push(...unpacked.files);
      notes.push(...unpacked.notes);
      // What came out of an archive stands in its place, on disk too.
      if (unpacked.files.every(({ path }) => path !== file.path)) await rm(file.path, { force: true });
    } catch (error) {
      if (!(error instanceof IntakeError)) throw error;
      files.push(file);
      broken.push([file.name, { message: error.message, problem: error.problem }]);
    }
  }
  return { files, broken: Object.fromEntries(broken), notes };
}
