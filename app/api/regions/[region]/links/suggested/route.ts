import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { suggestedLinks } from '@/lib/jobs/suggested-links';
import { rejectLink } from '@/lib/store/link-rejections';
import { suggestionAnswer } from './bodies';

type Params = { region: string };

/** Pairs of stations of which one seems to be the next below the other, each with the reason; and those rejected. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(await suggestedLinks((await regionOf(params)).id));
});

/** Rejects a suggestion, or lets it be made again. A link is made by POST to the links. */
export const POST = route<Params>(async (request, params) => {
  const { rejected, ...pair } = await readJson(request, suggestionAnswer);
  const region = await regionOf(params);
  await rejectLink(region.id, pair, rejected);
  return jsonAnswer({ ...pair, rejected });
});
