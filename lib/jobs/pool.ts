import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { SHARE_ENV } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { TaskName, Tasks } from './tasks.ts';

const KEY = Symbol.for('hungerstone.pool');
const holder = globalThis as { [KEY]?: Piscina };

/** A worker that has had nothing to do for this long ends, and gives its memory back. */
const IDLE_MILLISECONDS = 20_000;

/** Worker threads in all: one a core, and at least two, so that an import never keeps a ranking waiting. */
export const THREADS = Math.max(2, availableParallelism());

/** The process's one pool of workers. It hangs on `globalThis` since a Next server loads this module several times. */
function pool(minThreads = 0): Piscina {
  holder[KEY] ??= new Piscina({
    filename: join(/* turbopackIgnore: true */ process.cwd(), '.build', 'worker.mjs'),
    minThreads,
    maxThreads: THREADS,
    idleTimeout: IDLE_MILLISECONDS,
    // A worker must hear the message that cancels its import: it may not sleep in Atomics.wait.
    atomics: 'disabled',
    // The database's place comes from the environment, also when a test sets another one.
    env: SHARE_ENV,
  });
  return holder[KEY];
}

/** Starts all workers and keeps them: for a server, where the first asker should not wait for them to load. */
export function keepWorkersReady(): void {
  pool(THREADS);
}

/** Runs a task of lib/jobs/tasks.ts in a worker and answers its result. Typed arrays in `transfer` move, uncopied.
 *  @throws what the task throws; an AbortError when `signal` is aborted before the task began */
export async function runTask<Name extends TaskName>(
  name: Name,
  task: Parameters<Tasks[Name]>[0],
  { transfer = [], signal }: { transfer?: Transferable[]; signal?: AbortSignal } = {},
): Promise<Awaited<ReturnType<Tasks[Name]>>> {
  return pool().run(task, { name, transferList: transfer as never, signal });
}

/** Ends all workers; for the end of a batch command or a test. */
export async function closePool(): Promise<void> {
  const current = holder[KEY];
  holder[KEY] = undefined;
  await current?.destroy();
}
