import type { KnownStation } from '../intake/types.ts';
import { knownStations } from '../store/known-stations.ts';
import { regionBounds } from '../store/region-bounds.ts';
import { byFileName } from './by-file-name.ts';
import type { FileChoices } from './import-types.ts';
import type { Looked } from './look-at-file.ts';
import { runTask } from './pool.ts';
import { inTurn, readSession, type UploadSession, writeSession } from './upload-session.ts';
import { type FilePreview, inShort, type UploadedFile } from './upload-types.ts';

/** Looks at files of an upload under new choices, and keeps both with it.
 *  @param choices  by file name; a file keeps what is said here until it is said anew
 *  @returns        a preview for each file named, in the order given; null when the upload is no longer there
 *  @throws RangeError for a name that is none of its files */
export async function lookAtUpload(id: string, choices: Record<string, FileChoices>): Promise<FilePreview[] | null> {
  const names = Object.keys(choices);
  if (names.length === 0) return (await readSession(id)) && [];
  const session = await changed(id, (now) => withChoices(now, choices));
  if (!session) return null;
  const looks = names.map((name) => lookOf(session, name, choices[name]));
  // Nothing else waits for the look itself: one file's is short, that of forty is not.
  const looked = await runTask('lookAtFiles', { looks, known: knownTo(session, names) }).catch(
    async (error: unknown) => {
      // Whoever gave the upload up meanwhile took the files away from under the look.
      if (await readSession(id)) throw error;
      return null;
    },
  );
  if (looked === null) return null;
  await changed(id, (now) => withLooks(now, looked));
  return looked.map(({ preview }) => preview);
}

/** Keeps which files of an upload are to stay out of its import. A registry that is left out, or taken after all, changes
 *  what the flows may name.
 *  @throws RangeError for a name that is none of its files */
export async function leaveOutOfUpload(id: string, leaveOut: readonly string[]): Promise<void> {
  await changed(id, (now) => {
    const stranger = leaveOut.find((name) => !now.files.some((file) => file.name === name));
    if (stranger !== undefined)
      throw new RangeError(`leaveOutOfUpload: leaveOut must name files of the upload, got "${stranger}"`);
    const other = ({ file }: UploadedFile) => leaveOut.includes(file) !== now.leaveOut.includes(file);
    const renamed = now.seen.some((one) => one.kind === 'registry' && other(one));
    const seen = now.seen.map((one) => (renamed && one.kind === 'flows' ? { ...one, state: 'unseen' as const } : one));
    return { ...now, seen, leaveOut };
  });
}

const changed = (id: string, change: (now: UploadSession) => UploadSession): Promise<UploadSession | null> =>
  inTurn(id, async () => {
    const now = await readSession(id);
    if (!now) return null;
    const next = change(now);
    await writeSession(next);
    return next;
  });

const withChoices = (session: UploadSession, choices: Record<string, FileChoices>): UploadSession => ({
  ...session,
  seen: session.seen.map((one) => ({ ...one, choices: byFileName(choices, one.file) ?? one.choices })),
});

function lookOf(session: UploadSession, name: string, choices: FileChoices) {
  const at = session.files.findIndex((file) => file.name === name);
  if (at < 0) throw new RangeError(`lookAtUpload: choices must name files of the upload, got "${name}"`);
  const near = session.regionId === null ? null : regionBounds(session.regionId);
  return {
    file: session.files[at],
    size: session.seen[at].size,
    choices,
    near,
    broken: byFileName(session.broken, name),
  };
}

/** The region's stations with those of the upload's own registries, but for the ones that are left out or looked at
 *  anew. */
function knownTo({ regionId, names, leaveOut }: UploadSession, anew: readonly string[]): KnownStation[] | null {
  const standing = regionId === null ? null : knownStations(regionId);
  const coming = Object.keys(names).flatMap((file) =>
    anew.includes(file) || leaveOut.includes(file) ? [] : names[file],
  );
  return standing === null && coming.length === 0 ? null : [...(standing ?? []), ...coming];
}

/** A registry that has come in, or reads otherwise now, changes what the flows may name: they are to be looked at anew. */
function withLooks(session: UploadSession, looked: readonly Looked[]): UploadSession {
  const fresh = new Map(looked.map(({ preview }) => [preview.file, inShort(preview)]));
  const byFile = new Map(Object.entries(session.names));
  for (const { preview, names: stations } of looked) {
    if (stations) byFile.set(preview.file, stations);
    else byFile.delete(preview.file);
  }
  const names = Object.fromEntries(byFile);
  const otherNames = JSON.stringify(names) !== JSON.stringify(session.names);
  const seen = session.seen.map((one) => {
    const anew: UploadedFile = otherNames && one.kind === 'flows' ? { ...one, state: 'unseen' } : one;
    const look = fresh.get(one.file);
    // A look that was overtaken by other choices is of no use.
    return look && JSON.stringify(look.choices) === JSON.stringify(one.choices) ? look : anew;
  });
  return { ...session, names, seen };
}
