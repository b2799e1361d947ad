import { randomUUID } from 'node:crypto';
import { launchImport } from './import-job.ts';
import type { FileChoices, ImportChoices } from './import-types.ts';
import { discardSession, inTurn, readSession, type UploadSession, writeSession } from './upload-session.ts';

export interface UploadOrder {
  /** laid over what has been said about each file */
  choices: ImportChoices;
  /** names of files that stay out of it */
  leaveOut: readonly string[];
  /** the region that the import makes, where the upload belongs to none */
  name?: string;
}

/** Imports the files of an upload as a job. They stay on the server until one has succeeded that was no dry run.
 *  @returns the job's id
 *  @throws RangeError when no file is left, or no region is named */
export async function importUpload(session: UploadSession, { choices, leaveOut, name }: UploadOrder): Promise<string> {
  const files = session.files.filter((file) => !leaveOut.includes(file.name));
  if (files.length === 0) throw new RangeError('importUpload: leaveOut must leave a file, got all of them');
  const region = session.regionId === null ? { name: name ?? '' } : { id: session.regionId };
  if ('name' in region && region.name === '') throw new RangeError('importUpload: name must name the region, got ""');
  const jobId = randomUUID();
  const dryRun = choices.dryRun ?? false;
  const said: Record<string, FileChoices> = Object.fromEntries(
    session.seen.map(({ file, choices: own }) => [file, own]),
  );
  const job = { id: jobId, dryRun, ...('name' in region ? { name: region.name } : {}) };
  await noteOrder(session.id, { job, leaveOut });
  const { result } = await launchImport({
    ...{ region, files, jobId },
    choices: { ...choices, files: { ...said, ...choices.files } },
  });
  // Whoever follows the job hears of a failure there.
  void result.then(
    () => (dryRun ? undefined : discardSession(session.id)),
    () => undefined,
  );
  return jobId;
}

const noteOrder = (id: string, order: Pick<UploadSession, 'job' | 'leaveOut'>): Promise<void> =>
  inTurn(id, async () => {
    const now = await readSession(id);
    if (now) await writeSession({ ...now, ...order });
  });
