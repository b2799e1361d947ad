import { randomUUID } from 'node:crypto';
import { MessageChannel } from 'node:worker_threads';
import type { KnownStation } from '../intake/types.ts';
import { knownStations } from '../store/known-stations.ts';
import { checkUnchecked } from './checks.ts';
import { NO_PROGRESS } from './import-meter.ts';
import type { GivenFile, ImportChoices, ImportOutcome, ImportProgress } from './import-types.ts';
import { FailedWithResult, type JobContext, launchJob } from './live-jobs.ts';
import { keepWorkersReady, runTask } from './pool.ts';

export const IMPORT_JOB = 'import';

export interface ImportOrder {
  /** a region that is there, or the name of one to be made by the import */
  region: { id: number } | { name: string };
  files: GivenFile[];
  choices: ImportChoices;
  jobId?: string;
  /** called when the job is over, however it ended */
  whenOver?: () => Promise<void>;
}

/** Imports files as a job: all of them or none. Imports run one after the other, each in a worker.
 *  @returns  the job's id, and its outcome: rejects with FailedWithResult, whose result is an ImportOutcome with the
 *            problem of every file, or with CancelledError; the database is then as it was */
export async function launchImport({
  region,
  files,
  choices,
  jobId = randomUUID(),
  whenOver = async () => undefined,
}: ImportOrder): Promise<{ id: string; result: Promise<ImportOutcome & { regionId: number | null }> }> {
  const regionId = 'id' in region ? region.id : null;
  const progress = { ...NO_PROGRESS, files: files.length };
  const job = { kind: IMPORT_JOB, id: jobId, regionId, progress };
  return launchJob({ ...job, regionOf: (outcome) => outcome.regionId ?? undefined }, async (context) => {
    try {
      const registry = regionId === null ? null : knownStations(regionId);
      return await inWorker(context, { region, files, choices, registry });
    } finally {
      await whenOver();
    }
  });
}

interface Work extends Pick<ImportOrder, 'region' | 'files' | 'choices'> {
  registry: KnownStation[] | null;
}

async function inWorker({ id, signal, report }: JobContext, work: Work) {
  const cancelled = new Int32Array(new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT));
  const cancel = () => Atomics.store(cancelled, 0, 1);
  signal.addEventListener('abort', cancel, { once: true });
  // One reads, and all check what was read: they load side by side.
  keepWorkersReady();
  const { port1, port2 } = new MessageChannel();
  let last = NO_PROGRESS;
  port1.on('message', (progress: ImportProgress) => {
    last = progress;
    report(progress);
  });
  try {
    const outcome = await runTask(
      'takeFiles',
      { ...work, jobId: id, progress: port2, cancelled },
      { transfer: [port2] },
    );
    if (outcome.problems.length > 0) throw new FailedWithResult(problemWords(outcome), outcome);
    if (outcome.regionId !== null)
      outcome.findings = await findingsOf(outcome.regionId, signal, (share) =>
        report({ ...last, stage: 'checking', file: null, share }),
      );
    // The worker's answer may overtake its last message.
    report({ ...last, stage: 'done', file: null, share: 1, secondsLeft: 0 });
    return outcome;
  } finally {
    signal.removeEventListener('abort', cancel);
    port1.close();
  }
}

/** Checks what the import touched. The import stands whatever comes of that: after a cancel, or when something goes wrong,
 *  its records are unchecked till the next check. */
async function findingsOf(
  regionId: number,
  signal: AbortSignal,
  onShare: (share: number) => void,
): Promise<ImportOutcome['findings']> {
  try {
    const { withFindings, findings } = await checkUnchecked(regionId, {
      signal,
      onProgress: ({ share }) => onShare(share),
    });
    return { stations: withFindings, findings };
  } catch (error) {
    if (!signal.aborted) process.emitWarning(error instanceof Error ? error : String(error));
    return undefined;
  }
}

function problemWords({ problems }: ImportOutcome): string {
  const more = problems.length - 1;
  return more === 0 ? problems[0].message : `${problems[0].message} (and ${more} more files with problems)`;
}
