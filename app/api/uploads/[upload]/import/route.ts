import { jsonAnswer } from '@/app/api/_http/answer';
import { jobOf } from '@/app/api/_http/job';
import { readJson } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { route } from '@/app/api/_http/route';
import { idleSessionOf, type UploadParams } from '@/app/api/_http/session';
import type { ImportChoices } from '@/lib/jobs/import-types';
import { importUpload } from '@/lib/jobs/import-upload';
import { getRegion, slugOf } from '@/lib/store/regions';
import { importOrder } from '../bodies';

/** Imports the files of an upload, or tries it (`dryRun`): answers the job at once. */
export const POST = route<UploadParams>(async (request, params) => {
  const session = await idleSessionOf(params);
  const { choices, leaveOut, dryRun, region } = await readJson(request, importOrder);
  if (session.files.every(({ name }) => leaveOut.includes(name))) {
    throw new Problem('bad-body', 'No file is left to import.');
  }
  if (session.regionId === null) await refuseTakenName(region?.name);
  // The mapping's keys were checked where the file was looked at, and are checked again where it is read.
  const said = { ...choices, ...(dryRun ? { dryRun } : {}) } as ImportChoices;
  const job = await importUpload(session, { choices: said, leaveOut, name: region?.name });
  return jsonAnswer(await jobOf({ job }), { status: 202, headers: { location: `/api/jobs/${job}` } });
});

async function refuseTakenName(name: string | undefined): Promise<void> {
  if (name === undefined) throw new Problem('bad-body', 'Name the region that the import is to make.');
  if (await getRegion(slugOf(name))) {
    throw new Problem('conflict', `There is a region of the name "${name}" already. Choose another name.`);
  }
}
