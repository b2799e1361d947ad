import { inspectFile } from '../intake/inspect-file.ts';
import { IntakeError, type KnownStation } from '../intake/types.ts';
import { ImportRefused } from '../store/import-refused.ts';
import { OverlapError } from '../store/overlap-error.ts';
import type { GivenFile, ImportChoices, ImportProblem } from './import-types.ts';
import { flowOptions } from './stage-file.ts';

/** What of an import went wrong, in the form that a job keeps and a screen shows. A file that needs an answer is looked
 *  at once more, so that the person sees what it holds.
 *  @param about  the file at hand; null when all were read
 *  @throws the error itself when it is none that a person could put right */
export async function problemOf(
  error: unknown,
  about: { file: GivenFile; choices: ImportChoices; registry: KnownStation[] | null } | null,
): Promise<ImportProblem> {
  if (!(error instanceof IntakeError || error instanceof ImportRefused)) throw error;
  const { message, problem } = error;
  return {
    // A part of a workbook is of the file that a person gave.
    file: about?.file.name ?? problem.file,
    message,
    problem,
    inspection: problem.needs && about ? await inspectionOf(about) : null,
  };
}

/** What keeps files that were all read well from being stored: a problem for each of them.
 *  @throws the error itself when it is none that a person could put right */
export async function refusalsOf(error: unknown): Promise<ImportProblem[]> {
  if (!(error instanceof OverlapError)) return [await problemOf(error, null)];
  return [error, ...error.others].map(({ message, problem, revisions }) => ({
    ...{ file: problem.file, message, problem, inspection: null, revisions },
  }));
}

async function inspectionOf(about: {
  file: GivenFile;
  choices: ImportChoices;
  registry: KnownStation[] | null;
}): Promise<ImportProblem['inspection']> {
  try {
    const { problems: _told, ...inspection } = await inspectFile(about.file.path, flowOptions(about));
    return inspection;
  } catch (error) {
    if (error instanceof IntakeError) return null;
    throw error;
  }
}
