import { closeSync, mkdtempSync, openSync, readSync, rmSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { type OpenPage, PAGE } from './pages.ts';

/** A page that was written to the file: its place there. */
export interface FiledPage {
  slot: number;
}

const SLOT_BYTES = PAGE * (Float64Array.BYTES_PER_ELEMENT + 1);

/** Pages on disk, in slots of one size; a slot that was read back to be written on is used again. The file is made with
 *  the first page, and on systems that allow it has no name any more once it is open: a process that dies leaves
 *  nothing. Writing is synchronous, like the reading loop that calls it. */
export class PageFile {
  private descriptor: number | null = null;
  private path = '';
  private slots = 0;
  private readonly free: number[] = [];

  /** @param place  path of the file; a folder of its own among the system's temporary ones unless given */
  constructor(private readonly place?: string) {}

  write({ values, codes }: OpenPage): FiledPage {
    const descriptor = this.descriptor ?? this.make();
    const slot = this.free.pop() ?? this.slots++;
    const start = slot * SLOT_BYTES;
    writeSync(
      descriptor,
      new Uint8Array(values.buffer, values.byteOffset, values.byteLength),
      0,
      values.byteLength,
      start,
    );
    writeSync(descriptor, codes, 0, codes.length, start + values.byteLength);
    return { slot };
  }

  /** Reads a page back into an open one. */
  read({ slot }: FiledPage, into: OpenPage): OpenPage {
    const { values, codes } = into;
    const start = slot * SLOT_BYTES;
    const bytes = new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
    readSync(this.descriptor!, bytes, 0, bytes.length, start);
    readSync(this.descriptor!, codes, 0, codes.length, start + bytes.length);
    return into;
  }

  /** Gives a slot free. */
  drop({ slot }: FiledPage): void {
    this.free.push(slot);
  }

  close(): void {
    if (this.descriptor === null) return;
    closeSync(this.descriptor);
    this.descriptor = null;
    rmSync(this.place === undefined ? dirname(this.path) : this.path, { recursive: true, force: true });
  }

  private make(): number {
    this.path = this.place ?? join(mkdtempSync(join(tmpdir(), 'hungerstone-pages-')), 'pages');
    this.descriptor = openSync(this.path, 'w+');
    // Where an open file cannot be removed, it goes with close().
    if (process.platform !== 'win32') rmSync(this.path, { force: true });
    return this.descriptor;
  }
}
