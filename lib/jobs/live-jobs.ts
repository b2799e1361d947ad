import { randomUUID } from 'node:crypto';
import { EventEmitter } from 'node:events';
import { inspect } from 'node:util';
import { beatJob, createJob, finishJob, getJob, startJob } from '../store/jobs.ts';

/** What a job that was cancelled throws. */
export class CancelledError extends Error {
  override name = 'CancelledError';
}

/** Thrown by a job that ends without success in a way that its asker must see whole. */
export class FailedWithResult extends Error {
  override name = 'FailedWithResult';
  constructor(
    message: string,
    readonly result: unknown,
  ) {
    super(message);
  }
}

/** What a job's work is given. */
export interface JobContext {
  id: string;
  /** aborted when the job is cancelled */
  signal: AbortSignal;
  /** tells where the work stands; as often as it likes */
  report(progress: unknown): void;
}

interface LiveJob {
  cancel: AbortController;
  progress: unknown;
  changed: EventEmitter;
  ended: Promise<void>;
}

interface Registry {
  jobs: Map<string, LiveJob>;
  /** the end of the last job of each queue: the next one begins after it */
  queues: Map<string, Promise<void>>;
}

const KEY = Symbol.for('hungerstone.jobs');
const holder = globalThis as { [KEY]?: Registry };

function registry(): Registry {
  holder[KEY] ??= { jobs: new Map(), queues: new Map() };
  return holder[KEY];
}

const HEARTBEAT_MS = 5_000;
/** Progress goes into the job's row at most this often; whoever watches in this process sees it at once. */
const STORE_PROGRESS_MS = 1_000;

export interface NewJob<Result> {
  kind: string;
  regionId: number | null;
  id?: string;
  /** what is shown before the work reports for the first time */
  progress?: unknown;
  /** the region that the work made */
  regionOf?: (result: Result) => number | undefined;
}

/** Starts long work as a job: its row is made at once, its state, progress, result and error are kept there.
 *  @param kind   also the queue: jobs of a kind run one after the other
 *  @param work   its answer becomes the row's result; what it throws, the row's error
 *  @returns      the job's id, and its end: the answer of `work`, or what it threw */
export async function launchJob<Result>(
  { kind, regionId, id = randomUUID(), progress = {}, regionOf = () => undefined }: NewJob<Result>,
  work: (context: JobContext) => Promise<Result>,
): Promise<{ id: string; result: Promise<Result> }> {
  await createJob({ id, kind, regionId });
  const { jobs, queues } = registry();
  const live: LiveJob = {
    cancel: new AbortController(),
    progress,
    changed: new EventEmitter().setMaxListeners(0),
    ended: Promise.resolve(),
  };
  // Also while it waits its turn: a job without a heartbeat counts as dead.
  const heartbeat = setInterval(() => void beatJob(id).catch(() => undefined), HEARTBEAT_MS);
  const before = queues.get(kind) ?? Promise.resolve();
  const turn = Promise.race([before, aborted(live.cancel.signal)]);
  const result = turn.then(() => run(id, live, work, regionOf)).finally(() => clearInterval(heartbeat));
  live.ended = result.then(
    () => undefined,
    () => undefined,
  );
  // One that was cancelled while it waited ends before the one it waited for; the next waits for both.
  const queue = Promise.all([before, live.ended]).then(() => undefined);
  queues.set(kind, queue);
  jobs.set(id, live);
  void queue.then(() => {
    if (queues.get(kind) === queue) queues.delete(kind);
  });
  void live.ended.then(() => {
    jobs.delete(id);
    live.changed.emit('change');
  });
  return { id, result };
}

function aborted(signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => signal.addEventListener('abort', () => resolve(), { once: true }));
}

async function run<Result>(
  id: string,
  live: LiveJob,
  work: (context: JobContext) => Promise<Result>,
  regionOf: (result: Result) => number | undefined,
): Promise<Result> {
  const { signal } = live.cancel;
  let stored = 0;
  const report = (progress: unknown) => {
    live.progress = progress;
    live.changed.emit('change');
    if (performance.now() - stored < STORE_PROGRESS_MS) return;
    stored = performance.now();
    void beatJob(id, progress).catch(() => undefined);
  };
  try {
    if (signal.aborted) throw new CancelledError('Cancelled before it began.');
    await startJob(id);
    live.changed.emit('change');
    const result = await work({ id, signal, report });
    await beatJob(id, live.progress);
    await finishJob(id, { state: 'done', result, regionId: regionOf(result) });
    return result;
  } catch (error) {
    const ended = signal.aborted ? new CancelledError('Cancelled.', { cause: error }) : error;
    await finishJob(id, endOf(ended));
    throw ended;
  }
}

function endOf(error: unknown): { state: 'failed' | 'cancelled'; error: string; result?: unknown } {
  if (error instanceof CancelledError) return { state: 'cancelled', error: error.message };
  if (error instanceof FailedWithResult) return { state: 'failed', error: error.message, result: error.result };
  // Anything else may hold paths or data of the machine: the server's own messages say it.
  process.emitWarning(error instanceof Error ? error : inspect(error));
  return { state: 'failed', error: 'Something went wrong in the program. The server’s own messages say why.' };
}

/** Asks a job of this process to stop, and waits until it has cleaned up.
 *  @returns false when no such job runs here */
export async function cancelJob(id: string): Promise<boolean> {
  const live = registry().jobs.get(id);
  if (!live) return false;
  live.cancel.abort();
  await live.ended;
  return true;
}

/** A job as it is shown: its row, with the progress that this process knows where it runs here. */
export async function viewJob(id: string) {
  const row = await getJob(id);
  if (!row) return null;
  const live = registry().jobs.get(id);
  const { kind, state, result, error, createdAt, finishedAt } = row;
  return { id, kind, state, progress: live?.progress ?? row.progress, result, error, createdAt, finishedAt };
}
export type JobView = NonNullable<Awaited<ReturnType<typeof viewJob>>>;

/** Longest wait between two looks at a job's row, milliseconds: a job of another process is only seen there. */
const LOOK_MS = 1_000;
/** Shortest: a stream of events is for eyes. */
const SHOW_MS = 100;

/** A job whenever something about it changed, its end last; then the walk is over. Nothing for an unknown job. */
export async function* followJob(id: string, signal: AbortSignal): AsyncGenerator<JobView> {
  let last = '';
  while (!signal.aborted) {
    const changed = nextChange(id, signal);
    const view = await viewJob(id);
    if (!view) return;
    const text = JSON.stringify(view);
    if (text !== last) yield view;
    last = text;
    if (view.state !== 'waiting' && view.state !== 'running') return;
    await changed;
  }
}

function nextChange(id: string, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const changed = registry().jobs.get(id)?.changed;
    const begun = performance.now();
    const end = () => {
      clearTimeout(timer);
      changed?.off('change', onChange);
      signal.removeEventListener('abort', end);
      resolve();
    };
    const onChange = () => setTimeout(end, Math.max(0, SHOW_MS - (performance.now() - begun)));
    const timer = setTimeout(end, LOOK_MS);
    changed?.once('change', onChange);
    signal.addEventListener('abort', end, { once: true });
  });
}
