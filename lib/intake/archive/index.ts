import { createReadStream } from 'node:fs';
import { mkdir, mkdtemp, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { createGunzip } from 'node:zlib';
import type { Entry } from 'yauzl';
import { IntakeError } from '../types.ts';
import { isWorkbook } from '../workbook/package.ts';
import { Budget } from './budget.ts';
import { isLink, lastPart, type Packing, packingOf, passedOver } from './kinds.ts';
import { UnpackedNames } from './unpacked-names.ts';
import { openZip, refuseBomb } from './zip-file.ts';

/** Archives may stand in archives so often: a ZIP of gzipped files, and no deeper. */
const DEEPEST = 2;

/** A file with the name that the person knows it by. */
export interface NamedFile {
  path: string;
  name: string;
  /** what it is, where that is known beforehand */
  kind?: 'registry' | 'layer' | 'flows';
}

export interface ExpandOptions {
  /** bytes that all unpacked files together may have */
  mostBytes: number;
  signal?: AbortSignal;
  /** after every piece: the archive, and the bytes unpacked of all so far */
  onProgress?(archive: string, bytes: number): void;
}

/** Puts the files of archives (.zip, .gz, told by content) in the place of the archives. Each is written under a number
 *  into a new folder below `folder`, for a name from outside never becomes a path. Workbooks, which are packed too, are
 *  files like others.
 *  @param folder  is made where it is missing; what was unpacked goes again when anything fails
 *  @returns  the files in their order, and notes on what was passed over
 *  @throws IntakeError for archives that are damaged, encrypted, too large, too deep, name files outside themselves or
 *          hold links; the signal's reason */
export async function expandArchives<File extends NamedFile>(
  files: readonly File[],
  folder: string,
  options: ExpandOptions,
): Promise<{ files: (File | NamedFile)[]; notes: string[] }> {
  const packings: Packing[] = [];
  // One after the other: thousands of files opened at once would be more than a process may have.
  for (const { path } of files) packings.push(await packingOf(path));
  if (packings.every((packing) => packing === null)) return { files: [...files], notes: [] };
  await mkdir(folder, { recursive: true });
  const target = await mkdtemp(join(folder, 'unpacked-'));
  try {
    const unpacking = new Unpacking(target, await Budget.of(target, options), files, options);
    for (const [number, file] of files.entries()) await unpacking.take(file, packings[number], 0);
    return { files: unpacking.files as (File | NamedFile)[], notes: unpacking.notes };
  } catch (error) {
    await rm(target, { recursive: true, force: true });
    throw error;
  }
}

class Unpacking {
  readonly files: NamedFile[] = [];
  readonly notes: string[] = [];
  private readonly names: UnpackedNames;
  private written = 0;
  /** the archive that was given, bytes, and what has come out of it, also of archives within it */
  private given = { name: '', packed: 0, inflated: 0 };

  constructor(
    private readonly folder: string,
    private readonly budget: Budget,
    files: readonly NamedFile[],
    private readonly options: ExpandOptions,
  ) {
    this.names = new UnpackedNames(files.map(({ name }) => name));
  }

  async take(file: NamedFile, packing: Packing, depth: number): Promise<void> {
    if (packing === null || (packing === 'zip' && (await isWorkbook(file.path, file.name)))) {
      this.files.push(file);
      return;
    }
    if (packing === 'tar' || packing === 'other-archive') {
      throw refusal(
        file.name,
        `this is ${packing === 'tar' ? 'a tar archive' : 'an archive of a kind that is not read'}`,
      );
    }
    if (depth === 0) this.given = { name: file.name, packed: (await stat(file.path)).size, inflated: 0 };
    if (depth >= DEEPEST) throw refusal(file.name, `archives stand more than ${DEEPEST} deep in one another`);
    if (packing === 'gzip') await this.takeGzip(file, depth);
    else await this.takeZip(file, depth);
  }

  private async takeGzip(file: NamedFile, depth: number): Promise<void> {
    const { size } = await stat(file.path);
    const path = this.nextPath();
    await this.budget.write(this.counted(inflate(file, size)), path, file.name, this.options);
    await this.takeUnpacked(file, path, file.name.replace(/\.(?:gz|gzip|z)$/i, ''), depth);
    if (depth > 0) await rm(file.path, { force: true });
  }

  private async takeZip(file: NamedFile, depth: number): Promise<void> {
    const zip = await openZip(file.path, file.name);
    try {
      const isCopy = saidTwice(zip.entries);
      const wanted = zip.entries.filter((entry) => !isCopy(entry) && this.isWanted(file.name, entry));
      for (const entry of wanted) refuseEntry(file.name, entry);
      const inflated = wanted.reduce((sum, entry) => sum + entry.uncompressedSize, 0);
      refuseBomb(inflated, (await stat(file.path)).size, file.name);
      this.budget.announce(inflated, file.name);
      if (wanted.length === 0) throw refusal(file.name, 'the archive holds no file that could be imported');
      for (const entry of wanted) {
        const path = this.nextPath();
        await this.budget.write(this.counted(zip.stream(entry)), path, file.name, this.options);
        await this.takeUnpacked(file, path, entry.fileName, depth);
      }
    } finally {
      zip.close();
    }
    if (depth > 0) await rm(file.path, { force: true });
  }

  /** Archives within archives multiply: each may be harmless, and all of them a bomb. */
  private async *counted(source: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
    for await (const chunk of source) {
      this.given.inflated += chunk.length;
      refuseBomb(this.given.inflated, this.given.packed, this.given.name);
      yield chunk;
    }
  }

  private isWanted(archive: string, entry: Entry): boolean {
    const reason = passedOver(entry);
    if (reason === null) return true;
    if (reason !== '') this.notes.push(`“${lastPart(entry.fileName)}” in ${archive} was passed over: ${reason}.`);
    return false;
  }

  private async takeUnpacked(archive: NamedFile, path: string, entry: string, depth: number): Promise<void> {
    // What an archive is said to be holds for its files, but for flows: a set of records may bring its registry along.
    const kind = archive.kind === undefined || archive.kind === 'flows' ? {} : { kind: archive.kind };
    const packing = await packingOf(path);
    const file = { path, name: packing === null ? this.names.take(entry) : lastPart(entry), ...kind };
    await this.take(file, packing, depth + 1);
  }

  private nextPath(): string {
    return join(this.folder, String(this.written++));
  }
}

/** The bytes of a gzipped file, as many as make sense for its size. */
async function* inflate(file: NamedFile, size: number): AsyncGenerator<Buffer> {
  const source = createReadStream(file.path);
  const gunzip = createGunzip();
  source.once('error', (error) => gunzip.destroy(error));
  source.pipe(gunzip);
  let bytes = 0;
  try {
    for await (const chunk of gunzip) {
      bytes += (chunk as Buffer).length;
      refuseBomb(bytes, size, file.name);
      yield chunk as Buffer;
    }
  } catch (cause) {
    if (cause instanceof IntakeError || !(cause instanceof Error)) throw cause;
    const error = new IntakeError({
      ...{ file: file.name, message: `the compressed file cannot be unpacked (${cause.message})` },
      remedy: 'Get it again; it is cut short or damaged',
    });
    error.cause = cause;
    throw error;
  } finally {
    source.destroy();
    gunzip.destroy();
  }
}

/** A region's archive says every record twice; its tables are what is read. */
function saidTwice(entries: readonly Entry[]): (entry: Entry) => boolean {
  const isRegion = ['region.json', 'imports.json'].every((name) => entries.some(({ fileName }) => fileName === name));
  return ({ fileName }) => isRegion && fileName.startsWith('waterml/');
}

function refuseEntry(archive: string, entry: Entry): void {
  const value = entry.fileName.slice(0, 200);
  if (entry.isEncrypted()) throw refusal(archive, 'a file of the archive is encrypted', value);
  if (isLink(entry)) throw refusal(archive, 'an entry of the archive is a link to another file', value);
  if (!entry.canDecodeFileData()) throw refusal(archive, 'a file is packed in a way that is not common', value);
}

function refusal(file: string, message: string, value?: string): IntakeError {
  const remedy = 'Unpack it yourself, and import the files or a plain .zip of them';
  return new IntakeError({ file, message, remedy, ...(value === undefined ? {} : { value }) });
}
