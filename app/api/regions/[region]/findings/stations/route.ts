import { jsonAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { countFindings } from '@/lib/store/findings';

/** How many findings of which kind and state each station has: what a list of them begins with. */
export const GET = route<{ region: string }>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer({ stations: countFindings((await regionOf(params)).id) });
});
