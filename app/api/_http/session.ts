import { isBusy } from '@/lib/jobs/open-upload';
import { readSession, type UploadSession } from '@/lib/jobs/upload-session';
import type { UploadView } from '@/lib/jobs/upload-types';
import { Problem } from './problem';

export type UploadParams = { upload: string };

/** For an upload that was imported, given up, or never there. */
export const gone = (): Problem =>
  new Problem('not-found', 'This upload is no longer here. Choose the files once more.');

/** The upload that an address names.
 *  @throws Problem 'not-found' */
export async function sessionOf({ upload: id }: UploadParams): Promise<UploadSession> {
  const session = await readSession(id);
  if (!session) throw gone();
  return session;
}

/** As `sessionOf`, for what may not be done while its files are being imported.
 *  @throws Problem 'conflict' */
export async function idleSessionOf(params: UploadParams): Promise<UploadSession> {
  const session = await sessionOf(params);
  if (await isBusy(session)) {
    throw new Problem('conflict', 'These files are being imported just now. Wait for its end, or cancel the import.');
  }
  return session;
}

/** What was found, or a problem where it is no longer there. */
export function present<Found extends UploadView | unknown[]>(found: Found | null): Found {
  if (found === null) throw gone();
  return found;
}
