import { open } from 'node:fs/promises';
import type { Entry } from 'yauzl';
import { type OpenZip, openZip } from '../archive/zip-file.ts';
import { encodingOf } from '../documents/decode-text.ts';
import { decodedText } from '../documents/read-text.ts';
import { type ElementHandler, parseXml } from '../documents/xml-events.ts';
import { IntakeError } from '../types.ts';

/** A workbook, opened: its parts by their names. */
export class WorkbookPackage {
  private readonly parts = new Map<string, Entry>();

  constructor(
    readonly file: string,
    private readonly zip: OpenZip,
  ) {
    for (const entry of zip.entries) this.parts.set(entry.fileName.toLowerCase(), entry);
  }

  has(part: string): boolean {
    return this.parts.has(part.toLowerCase());
  }

  /** The bytes of a part.
   *  @throws IntakeError when the workbook lacks it */
  bytes(part: string): AsyncIterable<Buffer> {
    const entry = this.parts.get(part.toLowerCase());
    if (entry !== undefined) return this.zip.stream(entry);
    throw new IntakeError({
      ...{ file: this.file, value: part },
      message: 'a part of the workbook is missing',
      remedy: 'Open it in a spreadsheet program and save it anew',
    });
  }

  /** Tells the elements of a part.
   *  @throws IntakeError when it is missing, or is no sound XML */
  async read(part: string, handler: ElementHandler, signal?: AbortSignal): Promise<void> {
    const file = `${this.file}, ${part}`;
    const [encoding, bytes] = await encodingOfFirst(this.bytes(part), file);
    await parseXml(decodedText(bytes, { file, encoding, signal }), file, handler);
  }

  close(): void {
    this.zip.close();
  }
}

/** Opens a workbook (.xlsx); null for any other file, by what it holds.
 *  @throws IntakeError for workbooks of other kinds, by name */
export async function openWorkbook(path: string, file: string): Promise<WorkbookPackage | null> {
  const start = await firstBytes(path);
  if (OLE.every((byte, at) => start[at] === byte)) {
    throw new IntakeError({
      file,
      message: 'this is an old workbook (.xls), or one that is protected by a password',
      remedy: 'Save it as .xlsx without a password, or the sheet as CSV',
    });
  }
  if (start.toString('latin1', 0, 4) !== 'PK\u0003\u0004') return null;
  const zip = await openZip(path, file);
  const names = zip.entries.map(({ fileName }) => fileName);
  if (names.some((name) => /(?:^|\/)worksheets\/[^/]+\.xml$/i.test(name)) && names.includes('_rels/.rels')) {
    return new WorkbookPackage(file, zip);
  }
  zip.close();
  const other = names.some((name) => /^xl\/workbook\.bin$/i.test(name))
    ? 'a binary workbook (.xlsb)'
    : names.includes('content.xml') && names.includes('META-INF/manifest.xml')
      ? 'an OpenDocument file (.ods)'
      : names.includes('word/document.xml')
        ? 'a text document (.docx)'
        : null;
  if (other === null) return null;
  throw new IntakeError({ file, message: `this is ${other}`, remedy: 'Save its table as .xlsx or as CSV' });
}

/** True for a workbook that can be read.
 *  @throws IntakeError for workbooks of other kinds, by name */
export async function isWorkbook(path: string, file: string): Promise<boolean> {
  const workbook = await openWorkbook(path, file);
  workbook?.close();
  return workbook !== null;
}

const OLE = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];

async function firstBytes(path: string): Promise<Buffer> {
  const handle = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(8), 0, 8, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await handle.close();
  }
}

async function encodingOfFirst(source: AsyncIterable<Buffer>, file: string) {
  const chunks = source[Symbol.asyncIterator]();
  const first = await chunks.next();
  const encoding = encodingOf(first.done ? new Uint8Array(0) : first.value, file);
  async function* all(): AsyncGenerator<Buffer> {
    try {
      if (first.done) return;
      yield first.value.subarray(encoding.mark);
      for (;;) {
        const next = await chunks.next();
        if (next.done) return;
        yield next.value;
      }
    } finally {
      await chunks.return?.();
    }
  }
  return [{ ...encoding, mark: 0 }, all()] as const;
}
