import { randomUUID } from 'node:crypto';
import { existsSync } from 'node:fs';
import { readdir, readFile, rename, stat, writeFile } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import type { KnownStation } from '../intake/types.ts';
import { databasePath } from '../store/database-url.ts';
import { byFileName } from './by-file-name.ts';
import type { FileChoices, GivenFile } from './import-types.ts';
import type { UnpackedUpload } from './unpack-upload.ts';
import { discardUpload, uploadFolder } from './upload-folder.ts';
import type { ArchiveInShort, PreviewProblem, UploadedFile } from './upload-types.ts';

/** An upload as it is kept on disk, beside its files, until it has been imported or is given up. */
export interface UploadSession {
  id: string;
  /** null: its import makes a region */
  regionId: number | null;
  createdAt: string;
  /** paths below the session's folder */
  files: GivenFile[];
  /** what is known of each file, in the same order */
  seen: UploadedFile[];
  /** by registry file: the stations that flows may name */
  names: Record<string, KnownStation[]>;
  /** by file: archives that could not be unpacked, and why */
  broken: Record<string, PreviewProblem>;
  /** what was passed over in archives */
  notes: string[];
  /** what the files are together, where they are those of a region's archive */
  archive: ArchiveInShort | null;
  /** names of files that are to stay out of the import */
  leaveOut: readonly string[];
  job: UploadJob | null;
}

/** The last import of an upload. */
export interface UploadJob {
  id: string;
  dryRun: boolean;
  /** the region that it makes; absent where the upload is for one */
  name?: string;
}

const STATE_FILE = 'session.json';
/** Ids are random, 122 bits: nobody comes upon another's upload by chance. */
const ID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

const KEY = Symbol.for('hungerstone.uploads');
const holder = globalThis as { [KEY]?: Map<string, Promise<unknown>> };

/** Runs `work` when what was begun before on the same session is over: its state is read, changed and written whole. */
export function inTurn<Result>(id: string, work: () => Promise<Result>): Promise<Result> {
  holder[KEY] ??= new Map();
  const turns = holder[KEY];
  const before = turns.get(id) ?? Promise.resolve();
  const mine = before.then(work, work);
  turns.set(id, mine);
  const done = () => {
    if (turns.get(id) === mine) turns.delete(id);
  };
  mine.then(done, done);
  return mine;
}

/** A new id, and the folder into which the files of a session may be written. */
export function newSessionFolder(id: string = randomUUID()): { id: string; folder: string } {
  return { id, folder: uploadFolder(id) };
}

/** A session's state; null when there is none of this id, or it has been imported or given up. */
export async function readSession(id: string): Promise<UploadSession | null> {
  if (!ID.test(id)) return null;
  const path = join(uploadFolder(id), STATE_FILE);
  if (!existsSync(path)) return null;
  const session = JSON.parse(await readFile(path, 'utf8')) as UploadSession;
  const { folder } = newSessionFolder(id);
  return { ...session, files: session.files.map((file) => ({ ...file, path: join(folder, file.path) })) };
}

/** Writes a session's state whole, or not at all. */
export async function writeSession(session: UploadSession): Promise<void> {
  const folder = uploadFolder(session.id);
  const files = session.files.map((file) => ({ ...file, path: file.path.slice(folder.length + 1) }));
  const draft = join(folder, `${STATE_FILE}.new`);
  await writeFile(draft, JSON.stringify({ ...session, files }));
  await rename(draft, join(folder, STATE_FILE));
}

/** Every session that waits, oldest first. */
export async function listSessions(): Promise<UploadSession[]> {
  const path = databasePath();
  const prefix = `${basename(path)}.upload-`;
  const names = (await readdir(dirname(path))).filter((name) => name.startsWith(prefix));
  const found = await Promise.all(names.map((name) => readSession(name.slice(prefix.length))));
  return found.filter((session) => session !== null).sort((a, b) => a.createdAt.localeCompare(b.createdAt));
}

/** Gives an upload up: its files go. */
export const discardSession = (id: string): Promise<void> => discardUpload(id);

/** Adds files to a session, each under a name of its own: choices are made by name.
 *  @param more  with `broken` by the names that they came with: files that cannot be taken, and why */
export async function withFiles(session: UploadSession, more: Readonly<UnpackedUpload>): Promise<UploadSession> {
  const taken = new Set(session.files.map(({ name }) => name));
  const unusable: [string, PreviewProblem][] = [];
  const files = more.files.map((file) => {
    const name = freeName(file.name, taken);
    taken.add(name);
    const why = byFileName(more.broken, file.name);
    if (why) unusable.push([name, why]);
    return { ...file, name };
  });
  const seen = await Promise.all(files.map(async ({ name, path }) => unseen(name, (await stat(path)).size)));
  const broken = { ...session.broken, ...Object.fromEntries(unusable) };
  const notes = [...session.notes, ...more.notes];
  return { ...session, files: [...session.files, ...files], seen: [...session.seen, ...seen], broken, notes };
}

/** Two files called alike come from two folders: the later one gets a number for its folder, since the name itself may
 *  be a station's. Example: "flows.csv" → "2/flows.csv" */
function freeName(name: string, taken: ReadonlySet<string>): string {
  if (!taken.has(name)) return name;
  let number = 2;
  while (taken.has(`${number}/${name}`)) number++;
  return `${number}/${name}`;
}

const unseen = (file: string, size: number, choices: FileChoices = {}): UploadedFile => ({
  ...{ file, size, choices, state: 'unseen', kind: null, layout: null, unit: null, stations: [], count: null },
  ...{ problem: null, needs: [], likeness: null },
});
