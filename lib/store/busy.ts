/** Another process or thread is writing, and did not finish in time. Answered over HTTP as 503 with Retry-After. */
export class StoreBusyError extends Error {
  override name = 'StoreBusyError';
  /** seconds after which it is worth trying again */
  readonly retryAfterSeconds = 2;
  constructor(
    message = 'The database is busy with another change; try again in a few seconds.',
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}

/** Longest that one call may block its thread while it waits for a lock, milliseconds. SQLite's calls are synchronous:
 *  what waits here holds up everything else in the thread. Longer waits go by whenFree, between calls. */
export const BLOCK_MS = 40;

/** How long a change waits for others before it gives up, milliseconds. */
const WAIT_MS = 5_000;

const PAUSE_MS = 15;

/** Runs a change, again and again while others hold the lock, without holding up the thread in between.
 *  `change` must leave nothing behind when it fails for the lock: one statement, or one transaction.
 *  @throws StoreBusyError when the lock stayed taken for `waitMs` */
export async function whenFree<T>(change: () => T | Promise<T>, { waitMs = WAIT_MS } = {}): Promise<T> {
  const deadline = performance.now() + waitMs;
  for (;;) {
    try {
      return await change();
    } catch (error) {
      if (!isBusy(error)) throw error;
      if (performance.now() < deadline) {
        await pause(PAUSE_MS);
        continue;
      }
      throw error instanceof StoreBusyError ? error : new StoreBusyError(undefined, { cause: error });
    }
  }
}

export const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

const BUSY_PRIMARY_CODES = [5, 6];

/** True when an error of libsql or Prisma means that another connection holds the lock. */
export function isBusy(error: unknown): boolean {
  if (typeof error !== 'object' || error === null) return false;
  if (error instanceof StoreBusyError) return true;
  const { rawCode, code, cause } = error as { rawCode?: unknown; code?: unknown; cause?: unknown };
  if (typeof rawCode === 'number' && BUSY_PRIMARY_CODES.includes(rawCode & 0xff)) return true;
  if (typeof code === 'string' && (code.startsWith('SQLITE_BUSY') || code.startsWith('SQLITE_LOCKED'))) return true;
  // Prisma's name for the adapter's SQLITE_BUSY, and for a transaction that found the connection taken
  if (code === 'P1008' || code === 'P2028') return true;
  if (typeof cause === 'object' && cause !== null && (cause as { kind?: unknown }).kind === 'SocketTimeout')
    return true;
  return cause !== undefined && cause !== error && isBusy(cause);
}
