import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { expandArchives, type NamedFile } from '../../../../lib/intake/archive/index.ts';
import { IntakeError } from '../../../../lib/intake/types.ts';
import { zipped } from '../../../zipped.ts';
import { handMade, rowOf } from '../workbook/workbook-parts.ts';

let folder = '';
let upload = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'hungerstone-archive-'));
  upload = join(folder, 'upload');
});
afterEach(() => rmSync(folder, { recursive: true }));

const CSV = 'date,flow\n2001-01-01,1\n';
async function expand(
  given: Record<string, string | Uint8Array>,
  options: { mostBytes?: number; kind?: NamedFile['kind'] } = {},
) {
  const { mostBytes = 1e9, kind } = options;
  const files = Object.entries(given).map(([name, content], at) => {
    const path = join(folder, `given-${at}`);
    writeFileSync(path, content);
    return { path, name, ...(kind ? { kind } : {}) };
  });
  const outcome = await expandArchives(files, upload, { mostBytes });
  return {
    notes: outcome.notes,
    kinds: outcome.files.map((file) => file.kind),
    files: outcome.files.map(({ name, path }) => [name, readFileSync(path, 'latin1')]),
    paths: outcome.files.map(({ path }) => path.slice(folder.length)),
  };
}
/** The refusal; nothing may be left in the folder that it unpacked into. */
async function refusalOf(given: Record<string, string | Uint8Array>, options = {}): Promise<IntakeError> {
  upload = mkdtempSync(join(folder, 'refused-'));
  const outcome = await expand(given, options).catch((error: unknown) => error);
  if (!(outcome instanceof IntakeError)) throw new Error(`expected an IntakeError, got ${String(outcome)}`);
  expect(existsSync(upload) ? readdirSync(upload) : []).toEqual([]);
  return outcome;
}

describe('expandArchives', () => {
  test('leaves files that are not packed as they are, and makes no folder for them', async () => {
    const { files } = await expand({ 'a.csv': CSV, 'b.txt': 'PK is no archive' });
    expect(files).toEqual([
      ['a.csv', CSV],
      ['b.txt', 'PK is no archive'],
    ]);
    expect(existsSync(upload)).toBe(false);
  });

  test('puts the files of archives in their place, told by content and not by name', async () => {
    const { files } = await expand({
      'first.csv': CSV,
      'set.bin': zipped({ 'x/a.csv': 'A', 'b.csv': 'B' }),
      'c.csv.gz': gzipSync('C'),
      'd.gzip': gzipSync('D'),
    });
    expect(files).toEqual([
      ['first.csv', CSV],
      ['a.csv', 'A'],
      ['b.csv', 'B'],
      ['c.csv', 'C'],
      ['d', 'D'],
    ]);
  });

  test('names of entries never become paths; files of one name keep their folder in it', async () => {
    const { files, paths } = await expand({
      'set.zip': zipped({ 'a/flows.csv': '1', 'b/flows.csv': '2' }),
      'flows.csv': '3',
    });
    expect(files.map(([name]) => name)).toEqual(['a/flows.csv', 'b/flows.csv', 'flows.csv']);
    expect(paths[0]).toMatch(/^\/upload\/unpacked-[^/]+\/\d+$/);
  });

  test('archives may stand in archives once, and no deeper', async () => {
    const { files } = await expand({
      'set.zip': zipped({ 'a.csv.gz': gzipSync('A'), 'more.zip': zipped({ 'b.csv': 'B' }) }),
    });
    expect(files).toEqual([
      ['a.csv', 'A'],
      ['b.csv', 'B'],
    ]);
    const deep = zipped({ 'a.zip': zipped({ 'b.zip': zipped({ 'c.csv': 'C' }) }) });
    expect((await refusalOf({ 'deep.zip': deep })).message).toMatch(/b\.zip: archives stand more than 2 deep/);
  });

  test('a workbook is a file, also within an archive', async () => {
    const workbook = handMade({ sheets: [{ name: 'Flows', rows: rowOf(1, [1]) }] });
    const { files } = await expand({ 'w.xlsx': workbook, 'set.zip': zipped({ 'v.xlsx': workbook }) });
    expect(files.map(([name]) => name)).toEqual(['w.xlsx', 'v.xlsx']);
  });

  test('folders, leavings of operating systems and read-me files are passed over, the latter with a note', async () => {
    const { files, notes } = await expand({
      'set.zip': zipped({
        ...{ 'x/': '', 'a.csv': 'A', '__MACOSX/._a.csv': 'm', '.DS_Store': 'd', 'README.txt': 'r', 'licence.md': 'l' },
        ...{ 'map.pdf': 'p', 'readme-stations.csv': 'S' },
      }),
    });
    expect(files.map(([name]) => name)).toEqual(['a.csv', 'readme-stations.csv']);
    expect(notes).toContain('“README.txt” in set.zip was passed over: it explains others.');
    expect(notes.length).toBe(5);
  });

  test('a registry’s archive is of registries; flows may bring their registry along', async () => {
    expect((await expand({ 's.zip': zipped({ 'a.csv': 'A' }) }, { kind: 'registry' })).kinds).toEqual(['registry']);
    expect((await expand({ 's.zip': zipped({ 'a.csv': 'A' }) }, { kind: 'flows' })).kinds).toEqual([undefined]);
  });

  test('stops when it is told to, and leaves nothing behind', async () => {
    const path = join(folder, 'given');
    writeFileSync(path, zipped({ 'a.csv': CSV }));
    const signal = AbortSignal.abort(new Error('stop'));
    const work = expandArchives([{ path, name: 'a.zip' }], upload, { mostBytes: 1e9, signal });
    await expect(work).rejects.toThrow('stop');
    expect(readdirSync(upload)).toEqual([]);
  });
});

/** Changes bytes of every central directory entry (PKWARE APPNOTE 4.3.12) or local header (4.3.7). */
function patched(bytes: Uint8Array, signature: number, change: (view: DataView, at: number) => void): Uint8Array {
  const copy = bytes.slice();
  const view = new DataView(copy.buffer);
  for (let at = 0; at + 4 <= copy.length; at++) if (view.getUint32(at, true) === signature) change(view, at);
  return copy;
}
const CENTRAL = 0x02014b50;
const renamed = (from: string, to: string) =>
  Uint8Array.from(
    Buffer.from(
      Buffer.from(zipped({ [from]: CSV }))
        .toString('latin1')
        .replaceAll(from, to),
      'latin1',
    ),
  );

describe('expandArchives refuses', () => {
  test.each([
    ['a path that climbs out', 'aaaaaaaa.csv', '../../x.csv'.padEnd(12, 'v')],
    ['an absolute path', 'aaaaaaaa.csv', '/etc/cronx.c'],
    ['a path with a drive', 'aaaaaaaa.csv', 'C:/autoexec.'],
    ['a path that climbs out with backslashes', 'aaaaaaaa.csv', '..\\..\\xxx.cs'],
  ])('%s', async (_what, from, to) => {
    const { problem } = await refusalOf({ 'set.zip': renamed(from, to.slice(0, 12)) });
    expect(problem).toMatchObject({ file: 'set.zip', message: 'the archive names a file outside itself' });
  });

  test('encrypted entries', async () => {
    // General purpose bit 0.
    const bytes = patched(zipped({ 'a.csv': CSV }), CENTRAL, (view, at) => view.setUint16(at + 8, 1, true));
    expect((await refusalOf({ 'set.zip': bytes })).message).toMatch(/a file of the archive is encrypted \(“a\.csv”\)/);
  });

  test('links', async () => {
    // Made by Unix (3), mode 0120777: a symbolic link.
    const bytes = patched(zipped({ 'a.csv': '/etc/passwd' }), CENTRAL, (view, at) => {
      view.setUint8(at + 5, 3);
      view.setUint32(at + 38, 0o120777 * 0x10000, true);
    });
    expect((await refusalOf({ 'set.zip': bytes })).message).toMatch(/is a link to another file/);
  });

  test('a way of packing that is not common', async () => {
    const bytes = patched(zipped({ 'a.csv': CSV }), CENTRAL, (view, at) => view.setUint16(at + 10, 98, true));
    expect((await refusalOf({ 'set.zip': bytes })).message).toMatch(/packed in a way that is not common/);
  });

  test('a zip bomb, before anything of it is written, and a gzip bomb', async () => {
    const zeros = new Uint8Array(101e6);
    expect((await refusalOf({ 'bomb.zip': zipped({ 'a.csv': zeros }) })).message).toMatch(
      /unpacks to more than 1000 times/,
    );
    expect((await refusalOf({ 'bomb.gz': gzipSync(zeros, { level: 9 }) })).message).toMatch(
      /unpacks to more than 1000 times/,
    );
  }, 30_000);

  test('a bomb within an archive, though neither unpacks to a thousand times its size', async () => {
    // Deflate packs zeros to a 1,032nd at most; fixed codes, as at level 1, to a 230th or so.
    const within = gzipSync(new Uint8Array(101e6), { level: 1 });
    expect(101e6 / within.length).toBeLessThan(1000);
    const bomb = zipped({ 'a.csv.gz': within });
    expect(within.length / bomb.length).toBeLessThan(1000);
    const { problem } = await refusalOf({ 'bomb.zip': bomb });
    expect(problem).toMatchObject({ file: 'bomb.zip', message: 'it unpacks to more than 1000 times its size' });
  }, 30_000);

  test('an entry that is larger than it says', async () => {
    const bytes = patched(zipped({ 'a.csv': 'x'.repeat(10_000) }), CENTRAL, (view, at) =>
      view.setUint32(at + 24, 10, true),
    );
    expect((await refusalOf({ 'set.zip': bytes })).message).toMatch(/the archive cannot be read/);
  });

  test('more than may be imported at once', async () => {
    const given = { 'set.zip': zipped({ 'a.csv': 'x'.repeat(600), 'b.csv': 'x'.repeat(600) }) };
    expect((await refusalOf(given, { mostBytes: 1000 })).message).toMatch(/larger than may be imported at once/);
    expect((await refusalOf({ 'a.gz': gzipSync('x'.repeat(1200)) }, { mostBytes: 1000 })).message).toMatch(
      /larger than may/,
    );
    expect((await expand(given, { mostBytes: 1200 })).files.length).toBe(2);
  });

  test.each([
    ['an archive that is cut short', zipped({ 'a.csv': CSV }).slice(0, 60), /the archive cannot be read/],
    ['a gzipped file that is cut short', gzipSync(CSV).subarray(0, 20), /cannot be unpacked/],
    ['an archive with nothing to import', zipped({ 'README.txt': 'r' }), /holds no file that could be imported/],
    ['an empty archive', zipped({}), /holds no file that could be imported/],
    ['a tar archive', tar(), /this is a tar archive/],
    ['a gzipped tar archive', gzipSync(tar()), /this is a tar archive/],
    [
      'an archive of another kind',
      Uint8Array.from([0x37, 0x7a, 0xbc, 0xaf, 0x27, 0x1c, 0]),
      /of a kind that is not read/,
    ],
  ])('%s', async (_what, bytes, message) => {
    expect((await refusalOf({ 'set.zip': bytes })).message).toMatch(message);
  });
});

/** The first block of a POSIX tar archive (IEEE 1003.1): its mark stands at 257. */
function tar(): Buffer {
  const block = Buffer.alloc(1024);
  block.write('a.csv', 0, 'latin1');
  block.write('ustar', 257, 'latin1');
  return block;
}
