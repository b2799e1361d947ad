import { open } from 'node:fs/promises';
import type { Entry } from 'yauzl';

/** What a file is, by its first bytes, as far as unpacking goes. */
export type Packing = 'zip' | 'gzip' | 'tar' | 'other-archive' | null;

const SIGNATURES: [Packing, number[]][] = [
  ['zip', [0x50, 0x4b, 0x03, 0x04]],
  // An archive without a single file.
  ['zip', [0x50, 0x4b, 0x05, 0x06]],
  ['gzip', [0x1f, 0x8b]],
  ['other-archive', [0x37, 0x7a, 0xbc, 0xaf, 0x27, 0x1c]],
  ['other-archive', [0x52, 0x61, 0x72, 0x21, 0x1a, 0x07]],
  ['other-archive', [0xfd, 0x37, 0x7a, 0x58, 0x5a, 0x00]],
  ['other-archive', [0x42, 0x5a, 0x68]],
  ['other-archive', [0x28, 0xb5, 0x2f, 0xfd]],
];
/** Where a tar archive says that it is one. */
const TAR_MARK_AT = 257;

/** How a file is packed; null for a file that is not. */
export async function packingOf(path: string): Promise<Packing> {
  const handle = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(TAR_MARK_AT + 5), 0, TAR_MARK_AT + 5, 0);
    const start = buffer.subarray(0, bytesRead);
    const known = SIGNATURES.find(([, bytes]) => bytes.every((byte, at) => start[at] === byte));
    // "BZh" may begin a text; packed text has a digit and the sign of a block behind it.
    if (known?.[1][0] === 0x42 && !/^BZh[1-9]1AY&SY/.test(start.toString('latin1'))) return null;
    if (known) return known[0];
    return start.toString('latin1', TAR_MARK_AT) === 'ustar' ? 'tar' : null;
  } finally {
    await handle.close();
  }
}

const README = /^(?:read[-_ ]?me|licen[cs]e|copying|changelog|lies ?mich|leia-?me|lisez-?moi|leggimi)\b[^/]*$/i;
const NO_DATA = /\.(?:pdf|docx?|rtf|html?|png|jpe?g|gif|tiff?|svg|exe|dll|ini|db)$/i;

/** Why an entry of an archive is passed over; null for one that is to be read, '' where nobody misses it. */
export function passedOver(entry: Entry): string | null {
  const name = entry.fileName;
  if (name.endsWith('/')) return '';
  const last = lastPart(name);
  if (/(?:^|\/)__MACOSX\//.test(name) || last.startsWith('.')) return 'an operating system left it there';
  if (README.test(last) && !/\.(?:csv|tsv|xlsx|json|geojson|xml)$/i.test(last)) return 'it explains others';
  return NO_DATA.test(last) ? 'its kind of file holds no data that is read' : null;
}

const UNIX = 3;
const TYPE_OF_FILE = 0o170000;
const SYMBOLIC_LINK = 0o120000;

/** True for an entry that only points to another file. */
export function isLink(entry: Entry): boolean {
  return entry.versionMadeBy >> 8 === UNIX && ((entry.externalFileAttributes >>> 16) & TYPE_OF_FILE) === SYMBOLIC_LINK;
}

/** The name of an archive's file without the folders that it lies in there. */
export function lastPart(name: string): string {
  return name.split('/').at(-1) ?? name;
}
