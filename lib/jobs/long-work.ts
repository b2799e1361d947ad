import type { LaneProgress, WorkContext } from './lanes.ts';
import { launchJob } from './live-jobs.ts';

/** Answers that take long enough for a job of their own. */
type LongKind = 'certainty' | 'regional' | 'windows' | 'alternatives';

/** Long work whose answer is kept. */
export interface LongWork<Value> {
  kind: LongKind;
  regionId: number;
  /** of the result: work of one key runs once at a time, however many ask for it */
  key: string;
  /** computes the answer and keeps it under `key` (see cached) */
  compute(context: WorkContext): Promise<Value>;
}

/** Work that runs in this process: its job, and its end. */
interface Running {
  id: string;
  result: Promise<unknown>;
}

const KEY = Symbol.for('hungerstone.long-work');
const holder = globalThis as { [KEY]?: Map<string, Promise<Running>> };

/** By kind and key. Only in memory: after a restart nothing runs, and the next asker starts anew. */
function running(): Map<string, Promise<Running>> {
  holder[KEY] ??= new Map();
  return holder[KEY];
}

/** Starts work as a job, or joins the job that does it already.
 *  @returns the job's id, and its end: the answer, or what the work threw, CancelledError when someone cancelled it */
export async function startOrJoin<Value>(work: LongWork<Value>): Promise<{ id: string; result: Promise<Value> }> {
  const name = `${work.kind} ${work.key}`;
  const found = running().get(name);
  if (found) return (await found) as { id: string; result: Promise<Value> };
  const started = launch(work);
  running().set(name, started);
  const forget = () => running().delete(name);
  started.then(({ result }) => result).then(forget, forget);
  return started;
}

async function launch<Value>({ kind, regionId, compute }: LongWork<Value>) {
  const progress: LaneProgress = { stage: kind, done: 0, of: 0, share: 0 };
  let value: Promise<Value> | undefined;
  // The answer is kept among the results and not in the job's row, which is no place for megabytes.
  const { id, result } = await launchJob({ kind, regionId, progress }, async ({ signal, report }) => {
    value = compute({ signal, onProgress: report });
    await value;
    return null;
  });
  return { id, result: result.then(() => value as Promise<Value>) };
}
