import { stat } from 'node:fs/promises';
import type { MessagePort } from 'node:worker_threads';
import type { KnownStation } from '../../intake/types.ts';
import { type Applied, applyStaging } from '../../store/apply-staging.ts';
import type { ArchivedRegion } from '../../store/archived-region.ts';
import { regionBounds } from '../../store/region-bounds.ts';
import { createStaging, type Staging } from '../../store/staging.ts';
import { ImportMeter, NO_PROGRESS, TELL_EVERY_MS } from '../import-meter.ts';
import { problemOf, refusalsOf } from '../import-problem.ts';
import {
  FILE_KINDS,
  type FileKind,
  type GivenFile,
  type ImportChoices,
  type ImportOutcome,
  type ImportProblem,
} from '../import-types.ts';
import { type OpenedArchive, openRegionArchive } from '../region-archive.ts';
import { discardRejectedRows } from '../rejected-rows.ts';
import { kindOf, type StagedFile, stageFile } from '../stage-file.ts';
import { discardUnpacked, type UnpackedFiles, unpackFiles } from '../unpack-files.ts';

export interface TakeFiles {
  jobId: string;
  /** a region that is there, or the name of one to be made */
  region: { id: number } | { name: string };
  files: GivenFile[];
  choices: ImportChoices;
  /** the region's stations where it has a registry; null where flows make the stations */
  registry: KnownStation[] | null;
  /** gets an ImportProgress from time to time */
  progress: MessagePort;
  /** the import is cancelled when the first element is no longer 0; shared memory, for a worker that parses hears nothing */
  cancelled: Int32Array;
}

/** Takes in the files of one import, or none of them: reads each into the staging database, registries before layers
 *  before flows whatever the order given, and when all are good copies them over. A dry run stops short of that.
 *  @returns  what was taken, or would be, or the problem of every file that cannot be taken
 *  @throws the signal's reason when cancelled; nothing is then left behind */
export async function takeFiles(task: TakeFiles): Promise<ImportOutcome & { regionId: number | null }> {
  try {
    const { files, notes } = await unpack(task);
    const archive = await openRegionArchive(files);
    const outcome = await takeUnpacked(archive ? fromArchive(task, archive) : { ...task, files });
    return notes.length > 0 ? { ...outcome, notes } : outcome;
  } catch (error) {
    if (isCancelled(task)) throw error;
    return { taken: [], problems: await refusalsOf(error), regionId: null };
  } finally {
    await discardUnpacked(task.jobId);
    task.progress.close();
  }
}

const isCancelled = ({ cancelled }: TakeFiles): boolean => Atomics.load(cancelled, 0) !== 0;

/** The files, with those of archives in the place of the archives. */
async function unpack(task: TakeFiles): Promise<UnpackedFiles> {
  const cancel = new AbortController();
  let told = Number.NEGATIVE_INFINITY;
  return await unpackFiles(task.files, {
    ...{ jobId: task.jobId, signal: cancel.signal },
    onProgress(file, bytes) {
      if (isCancelled(task)) cancel.abort();
      if (performance.now() - told < TELL_EVERY_MS) return;
      told = performance.now();
      task.progress.postMessage({ ...NO_PROGRESS, stage: 'recognising', file, files: task.files.length, bytes });
    },
  });
}

interface Unpacked extends TakeFiles {
  /** what an archive says of the region itself */
  archived?: ArchivedRegion;
}

/** The files of a region's archive, each with what its first import was; what a person chose for a file goes before. */
function fromArchive(task: TakeFiles, { files, choices, region }: OpenedArchive): Unpacked {
  const chosen = task.choices.files ?? {};
  const merged = Object.entries(choices).map(([name, choice]) => [name, { ...choice, ...chosen[name] }] as const);
  return { ...task, files, choices: { ...task.choices, files: Object.fromEntries(merged) }, archived: region };
}

async function takeUnpacked(task: Unpacked): Promise<ImportOutcome & { regionId: number | null }> {
  const cancel = new AbortController();
  const sizes = await Promise.all(task.files.map(async ({ path }) => (await stat(path)).size));
  const meter = new ImportMeter(sizes, (progress) => {
    task.progress.postMessage(progress);
    if (isCancelled(task)) cancel.abort();
  });
  const { signal } = cancel;
  const staging = createStaging(task.jobId);
  const staged: StagedFile[] = [];
  let taken = false;
  try {
    const problems = await stageAll(task, { staging, staged, meter, signal });
    if (problems.length > 0) return { taken: [], problems, regionId: null };
    if (task.archived) staging.stageRegion(task.archived);
    staging.seal();
    meter.store(0);
    const { by, revise, rule, dryRun = false } = task.choices;
    const applied = await applyStaging(task.jobId, {
      ...{ region: task.region, by, revise, rule, dryRun, signal },
      onProgress: (share) => meter.store(share),
    });
    taken = !dryRun;
    meter.done();
    return { ...outcomeOf(staged, applied, dryRun), regionId: taken ? applied.regionId : null };
  } catch (error) {
    signal.throwIfAborted();
    return { taken: [], problems: await refusalsOf(error), regionId: null };
  } finally {
    staging.discard();
    if (!taken) discardRejectedRows(staged.map(({ report }) => report?.rejectedFile ?? null));
  }
}

interface Tools {
  staging: Staging;
  staged: StagedFile[];
  meter: ImportMeter;
  signal: AbortSignal;
}

/** Reads every file, also after one was found bad, so that a person hears of all problems at once. */
async function stageAll(task: TakeFiles, { staging, staged, meter, signal }: Tools): Promise<ImportProblem[]> {
  const problems: ImportProblem[] = [];
  const files: { file: GivenFile; index: number; kind: FileKind }[] = [];
  for (const [index, file] of task.files.entries()) {
    signal.throwIfAborted();
    files.push({ file, index, kind: await kindOf(file, task.choices) });
  }
  files.sort((a, b) => FILE_KINDS.indexOf(a.kind) - FILE_KINDS.indexOf(b.kind) || a.index - b.index);
  let registry = task.registry;
  for (const [done, { file, index, kind }] of files.entries()) {
    signal.throwIfAborted();
    meter.begin(file.name, done + 1);
    try {
      const one = await stageFile(file, kind, {
        ...{ jobId: task.jobId, fileNumber: index + 1, choices: task.choices, registry, staging, signal },
        near: 'id' in task.region ? regionBounds(task.region.id) : null,
        onProgress: (rows, bytes) => meter.read(rows, bytes),
      });
      staged.push(one);
      if (one.registry) registry = joined(registry ?? [], one.registry);
      meter.end(index, one.rows);
    } catch (error) {
      signal.throwIfAborted();
      problems.push(await problemOf(error, { file, choices: task.choices, registry }));
      meter.end(index, 0);
    }
  }
  return problems;
}

/** The stations of both lists, each once; where both have one, as the second names it. */
const joined = (standing: readonly KnownStation[], given: readonly KnownStation[]): KnownStation[] => [
  ...new Map([...standing, ...given].map((station) => [station.code, station])).values(),
];

function outcomeOf(staged: readonly StagedFile[], applied: Applied, dryRun: boolean): ImportOutcome {
  return {
    taken: staged.map(({ file, kind, summary, report, warnings }, i) => {
      const { id, stationsMade, revisions } = applied.imports[i];
      const made = stationsMade > 0 ? `, ${stationsMade} of them new` : '';
      return {
        ...{ importId: id, file: file.name, kind, warnings, revisions },
        // A dry run keeps no file of rejected rows.
        report: report && dryRun ? { ...report, rejectedFile: null } : report,
        summary: kind === 'registry' ? `${summary}${made}` : summary,
      };
    }),
    problems: [],
    ...(dryRun ? { dryRun } : {}),
  };
}
