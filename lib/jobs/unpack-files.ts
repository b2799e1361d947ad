import { rm } from 'node:fs/promises';
import { expandArchives } from '../intake/archive/index.ts';
import type { GivenFile } from './import-types.ts';
import { uploadFolder } from './upload-folder.ts';
import { uploadLimit } from './upload-limit.ts';

/** The files of an import with those of its archives in their place. */
export interface UnpackedFiles {
  files: GivenFile[];
  /** what was passed over in the archives */
  notes: string[];
}

export interface UnpackTools {
  jobId: string;
  signal: AbortSignal;
  onProgress(archive: string, bytes: number): void;
}

/** Folder beside the database for what an import unpacks; one that a dead process left goes like an upload. */
const folderOf = (jobId: string): string => uploadFolder(`${jobId}-unpacked`);

/** Unpacks the archives among the files of an import; `discardUnpacked` when it is over.
 *  @throws IntakeError when one of them cannot be taken; the signal's reason. Nothing is then left behind */
export async function unpackFiles(files: readonly GivenFile[], tools: UnpackTools): Promise<UnpackedFiles> {
  const { jobId, signal, onProgress } = tools;
  return await expandArchives(files, folderOf(jobId), { mostBytes: uploadLimit(), signal, onProgress });
}

/** Removes what an import unpacked, if it unpacked anything. */
export async function discardUnpacked(jobId: string): Promise<void> {
  await rm(folderOf(jobId), { recursive: true, force: true });
}
