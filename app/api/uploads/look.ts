import type { FileChoices } from '@/lib/jobs/import-types';
import { leaveOutOfUpload, lookAtUpload } from '@/lib/jobs/look-at-upload';
import type { FilePreview } from '@/lib/jobs/upload-types';
import { Problem } from '../_http/problem';
import { present } from '../_http/session';

/** Looks at files of an upload under the choices of a request.
 *  @throws Problem for a file that the upload does not have */
export async function lookedAt(id: string, choices: Record<string, unknown>): Promise<FilePreview[]> {
  return present(await lookAtUpload(id, choices as Record<string, FileChoices>).catch(unknownFile));
}

/** Keeps which files of an upload stay out of its import.
 *  @throws Problem for a file that the upload does not have */
export const leftOut = (id: string, files: readonly string[]): Promise<void> =>
  leaveOutOfUpload(id, files).catch(unknownFile);

function unknownFile(error: unknown): never {
  if (error instanceof RangeError) throw new Problem('bad-body', 'The upload has no file of this name.');
  throw error;
}
