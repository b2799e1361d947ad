import { jsonAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { openSession } from '@/app/api/_http/receive-session';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { uploadsOf } from '@/lib/jobs/open-upload';

type Params = { region: string };

/** Uploads that wait for their import into a region. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(await uploadsOf((await regionOf(params)).id));
});

/** Receives files for a region, to be looked at before they are imported. Archives are unpacked. */
export const POST = route<Params>(async (request, params) => openSession(request, (await regionOf(params)).id));
