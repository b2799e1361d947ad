import { listRegions } from '../store/regions.ts';
import type { GivenFile } from './import-types.ts';
import { type JobView, viewJob } from './live-jobs.ts';
import { lookAtUpload } from './look-at-upload.ts';
import { unpackUpload } from './unpack-upload.ts';
import { withArchive } from './upload-archive.ts';
import {
  discardSession,
  inTurn,
  listSessions,
  newSessionFolder,
  readSession,
  type UploadSession,
  withFiles,
  writeSession,
} from './upload-session.ts';
import type { UploadView } from './upload-types.ts';

/** Files that are looked at before an upload is answered; the screen asks for the others, some at a time. */
const LOOKED_AT_ONCE = 40;

/** Opens a session for files that lie in its folder, or adds them to the one that is open. Archives are unpacked.
 *  @param fresh  whether the session is a new one
 *  @returns false when the one to add to was given up meanwhile */
export async function takeUpload(
  { id, regionId, fresh }: Pick<UploadSession, 'id' | 'regionId'> & { fresh: boolean },
  given: readonly GivenFile[],
): Promise<boolean> {
  const unpacked = await unpackUpload(given, newSessionFolder(id).folder);
  const first = await inTurn(id, async () => {
    const open = fresh ? emptySession(id, regionId) : await readSession(id);
    if (!open) return null;
    const session = await withArchive(await withFiles(open, unpacked));
    await writeSession(session);
    return session.seen.filter(({ state }) => state === 'unseen').slice(0, LOOKED_AT_ONCE);
  });
  if (first === null) return false;
  if (first.length > 0) await lookAtUpload(id, Object.fromEntries(first.map(({ file, choices }) => [file, choices])));
  return true;
}

const emptySession = (id: string, regionId: number | null): UploadSession => ({
  ...{
    id,
    regionId,
    createdAt: new Date().toISOString(),
    files: [],
    seen: [],
    names: {},
    broken: {},
    notes: [],
    archive: null,
    leaveOut: [],
    job: null,
  },
});

/** An upload as it is shown; null when there is none of this id. */
export async function viewUpload(id: string): Promise<UploadView | null> {
  const session = await readSession(id);
  return session && viewOf(session, await slugs());
}

/** The uploads that wait for a region, or for one to be made (null), oldest first. */
export async function uploadsOf(regionId: number | null): Promise<UploadView[]> {
  const sessions = (await listSessions()).filter((session) => session.regionId === regionId);
  const bySlug = await slugs();
  return Promise.all(sessions.map((session) => viewOf(session, bySlug)));
}

/** Gives up the uploads of regions that are no longer there.
 *  @returns how many uploads wait after that */
export async function discardOrphanedUploads(): Promise<number> {
  const [sessions, bySlug] = await Promise.all([listSessions(), slugs()]);
  const orphans = sessions.filter(({ regionId }) => regionId !== null && !bySlug.has(regionId));
  for (const { id } of orphans) await discardSession(id);
  return sessions.length - orphans.length;
}

const slugs = async () => new Map((await listRegions()).map(({ id, slug }) => [id, slug]));

async function viewOf(session: UploadSession, bySlug: Map<number, string>): Promise<UploadView> {
  const { id, regionId, createdAt, seen, notes, archive, leaveOut, job } = session;
  const view = job && (await viewJob(job.id));
  return {
    ...{ id, createdAt, files: seen, notes, archive, leaveOut },
    region: regionId === null ? null : (bySlug.get(regionId) ?? null),
    job: job && view ? { ...job, state: view.state } : null,
  };
}

/** Whether an import of the session is under way. */
export async function isBusy(session: UploadSession): Promise<boolean> {
  const view: JobView | null = session.job && (await viewJob(session.job.id));
  return view?.state === 'waiting' || view?.state === 'running';
}
