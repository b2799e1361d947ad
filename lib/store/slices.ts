import { isMainThread } from 'node:worker_threads';
import { pause, whenFree } from './busy.ts';
import type { Connection } from './connection.ts';

export interface SliceOptions {
  /** longest that one slice holds the write lock and its thread, milliseconds; short by default in the main thread, where
   *  it would hold up the answering of requests */
  sliceMs?: number;
  signal?: AbortSignal;
  /** runs at the start of every slice, inside its transaction */
  before?: () => void;
  /** after every slice */
  onProgress?: (done: number) => void;
}

/** How long a slice waits for others before it gives up, milliseconds: imports are patient. */
const PATIENCE_MS = 60_000;

/** Works through items in transactions of at most about `sliceMs`, with a pause between them in which others can write
 *  and the thread can do other things. Nothing ties the slices together: readers must not look at what they write until
 *  all are done.
 *  @throws what `work` throws, with the slice at hand rolled back and the earlier ones in place; the signal's reason */
export async function inSlices<T>(
  connection: Connection,
  items: Iterable<T>,
  work: (item: T) => void,
  { sliceMs = isMainThread ? 50 : 300, signal, before, onProgress }: SliceOptions = {},
): Promise<void> {
  const queue = items[Symbol.iterator]();
  let next = queue.next();
  let done = 0;
  while (!next.done) {
    signal?.throwIfAborted();
    await whenFree(() => connection.exec('BEGIN IMMEDIATE'), { waitMs: PATIENCE_MS });
    const end = performance.now() + sliceMs;
    try {
      before?.();
      do {
        work(next.value);
        done++;
        next = queue.next();
      } while (!next.done && performance.now() < end);
      connection.exec('COMMIT');
    } catch (error) {
      if (connection.inTransaction) connection.exec('ROLLBACK');
      throw error;
    }
    onProgress?.(done);
    if (!next.done) await pause(Math.max(10, sliceMs / 5));
  }
}
