import { createWriteStream } from 'node:fs';
import { statfs } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { IntakeError } from '../types.ts';
import type { ExpandOptions } from './index.ts';

/** Room on the disk that unpacking leaves free, bytes. */
const LEFT_FREE = 64e6;

/** How much may be unpacked, and how much has been. */
export class Budget {
  private written = 0;

  private constructor(
    private readonly most: number,
    private readonly free: number,
  ) {}

  /** @param folder  where it is unpacked */
  static async of(folder: string, { mostBytes }: ExpandOptions): Promise<Budget> {
    const { bavail, bsize } = await statfs(folder);
    return new Budget(mostBytes, bavail * bsize - LEFT_FREE);
  }

  /** Refuses what an archive says of itself before anything of it is written.
   *  @throws IntakeError */
  announce(bytes: number, archive: string): void {
    this.refuse(this.written + bytes, archive);
  }

  /** Writes bytes into a new file.
   *  @throws IntakeError when they are too many; the signal's reason */
  async write(
    source: AsyncIterable<Buffer>,
    path: string,
    archive: string,
    { signal, onProgress }: ExpandOptions,
  ): Promise<void> {
    const counted = async function* (this: Budget): AsyncGenerator<Buffer> {
      for await (const chunk of source) {
        signal?.throwIfAborted();
        this.written += chunk.length;
        this.refuse(this.written, archive);
        onProgress?.(archive, this.written);
        yield chunk;
      }
    };
    await pipeline(Readable.from(counted.call(this)), createWriteStream(path, { flags: 'wx' }));
  }

  private refuse(bytes: number, archive: string): void {
    if (bytes <= this.most && bytes <= this.free) return;
    const gigabytes = (value: number) => `${(value / 1e9).toFixed(1)} GB`;
    const limited = this.most <= this.free;
    throw new IntakeError({
      ...{ file: archive, value: `more than ${gigabytes(Math.max(0, Math.min(this.most, this.free)))}` },
      message: limited
        ? 'the files of the archive are larger than may be imported at once'
        : 'the disk has no room for it',
      remedy: limited
        ? 'Import fewer files at once, or raise HUNGERSTONE_MAX_UPLOAD'
        : 'Make room on the disk that holds the database',
    });
  }
}
