import { inspectFile } from '../intake/inspect-file.ts';
import { IntakeError, type KnownStation } from '../intake/types.ts';
import { ImportRefused } from '../store/import-refused.ts';
import type { GivenFile, ImportChoices, ImportProblem } from './import-types.ts';
import { flowOptions } from './stage-file.ts';

/** What of an import went wrong, in the form that a job keeps and a screen shows. A file that needs an answer is looked
 *  at once more, so that the person sees what it holds.
 *  @param about  the file at hand; null when all were read and could not be stored
 *  @throws the error itself when it is none that a person could put right */
export async function problemOf(
  error: unknown,
  about: { file: GivenFile; choices: ImportChoices; registry: KnownStation[] | null } | null,
): Promise<ImportProblem> {
  if (!(error instanceof IntakeError || error instanceof ImportRefused)) throw error;
  const { message, problem } = error;
  return {
    file: problem.file,
    message,
    problem,
    inspection: problem.needs && about ? await inspectionOf(about) : null,
  };
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
