import { IntakeError } from '../intake/types.ts';
import { openRegionArchive } from './region-archive.ts';
import type { UploadSession } from './upload-session.ts';
import type { ArchiveInShort } from './upload-types.ts';

/** The session with what its files are together: of a region's archive nothing has to be asked, and none of its files is
 *  looked at by itself. A damaged archive says so at the file that is at fault. */
export async function withArchive(session: UploadSession): Promise<UploadSession> {
  try {
    const archive = await openRegionArchive(session.files);
    if (archive === null) return { ...session, archive: null };
    const kinds = Object.values(archive.choices).map(({ kind }) => kind);
    const number = (wanted: string) => kinds.filter((kind) => kind === wanted).length;
    const read = new Set(archive.files.map(({ name }) => name));
    const others = session.files.map(({ name }) => name).filter((name) => !read.has(name) && !ABOUT.test(name));
    const short: ArchiveInShort = {
      ...{ name: archive.name, stations: number('registry'), layers: number('layer'), flows: number('flows') },
      documents: others.filter((name) => XML.test(name)).length,
      unread: others.filter((name) => !XML.test(name)),
    };
    const seen = session.seen.map((one) => ({ ...one, state: 'ready' as const, problem: null, needs: [] }));
    return { ...session, archive: short, seen };
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    const broken = { ...session.broken, [error.problem.file]: { message: error.message, problem: error.problem } };
    return { ...session, archive: null, broken };
  }
}

/** What describes an archive. */
const ABOUT = /(?:^|\/)(?:region\.json|imports\.json|README\.txt)$/;
const XML = /\.xml$/;
