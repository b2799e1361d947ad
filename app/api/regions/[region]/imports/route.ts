import { randomUUID } from 'node:crypto';
import { jsonAnswer } from '@/app/api/_http/answer';
import { jobOf } from '@/app/api/_http/job';
import { readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { receiveUpload } from '@/app/api/_http/upload';
import { launchImport } from '@/lib/jobs/import-job';
import type { ImportChoices } from '@/lib/jobs/import-types';
import { discardUpload, uploadFolder } from '@/lib/jobs/upload-folder';
import { listImports } from '@/lib/store/imports';
import { importChoices } from './bodies';

type Params = { region: string };

/** What was imported into a region, newest first. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  const region = await regionOf(params);
  return jsonAnswer(await listImports(region.id));
});

/** Imports the files of a multipart form: answers the job at once, which reads them. */
export const POST = route<Params>(async (request, params) => {
  const region = await regionOf(params);
  const jobId = randomUUID();
  try {
    const { files, fields } = await receiveUpload(request, uploadFolder(jobId));
    const choices = choicesIn(fields.get('choices') ?? '{}');
    const whenOver = () => discardUpload(jobId);
    await launchImport({ region: { id: region.id }, files, choices, jobId, whenOver });
  } catch (error) {
    await discardUpload(jobId);
    throw error;
  }
  return jsonAnswer(await jobOf({ job: jobId }), { status: 202, headers: { location: `/api/jobs/${jobId}` } });
});

function choicesIn(text: string): ImportChoices {
  let choices: unknown;
  try {
    choices = JSON.parse(text);
  } catch {
    throw new Problem('bad-body', 'The field "choices" must be JSON.');
  }
  // The mapping's keys are checked where the file is read, by the same rules as in the import command.
  return importChoices.parse(choices) as ImportChoices;
}
