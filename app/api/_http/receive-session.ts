import { randomUUID } from 'node:crypto';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { discardOrphanedUploads, takeUpload, viewUpload } from '@/lib/jobs/open-upload';
import { discardAbandonedUploads } from '@/lib/jobs/upload-folder';
import { discardSession, newSessionFolder, type UploadSession } from '@/lib/jobs/upload-session';
import { jsonAnswer } from './answer';
import { Problem } from './problem';
import { gone, present } from './session';
import { MOST_FILES, receiveUpload } from './upload';

/** Uploads that may wait at a time: a full disk would hurt more than a refusal. */
const MOST_SESSIONS = 50;

/** Receives files for a region, or for one to be made, as an upload that waits for its import. */
export async function openSession(request: Request, regionId: number | null): Promise<Response> {
  await discardAbandonedUploads();
  if ((await discardOrphanedUploads()) >= MOST_SESSIONS) {
    throw new Problem(
      'conflict',
      `${MOST_SESSIONS} uploads wait for their import. Import or give up one of them first.`,
    );
  }
  const { id } = newSessionFolder();
  try {
    await receiveInto({ id, regionId, files: [], fresh: true }, request);
  } catch (error) {
    await discardSession(id);
    throw error;
  }
  return viewAnswer(id, 201);
}

/** Adds files to an upload that waits. */
export async function addToSession(request: Request, session: UploadSession): Promise<Response> {
  await receiveInto({ ...session, fresh: false }, request);
  return viewAnswer(session.id, 200);
}

async function receiveInto(
  { id, regionId, files: before, fresh }: Pick<UploadSession, 'id' | 'regionId' | 'files'> & { fresh: boolean },
  request: Request,
): Promise<void> {
  const folder = join(newSessionFolder(id).folder, randomUUID());
  try {
    const { files } = await receiveUpload(request, folder);
    if (before.length + files.length > MOST_FILES) {
      throw new Problem('too-large', `At most ${MOST_FILES} files at once. Import them in parts.`);
    }
    if (!(await takeUpload({ id, regionId, fresh }, files))) throw gone();
  } catch (error) {
    await rm(folder, { recursive: true, force: true });
    throw error;
  }
}

async function viewAnswer(id: string, status: number): Promise<Response> {
  return jsonAnswer(present(await viewUpload(id)), { status, headers: { location: `/api/uploads/${id}` } });
}
