import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { listLinks, setLink } from '@/lib/store/links';
import { link } from './bodies';

type Params = { region: string };

/** Which station lies below which, by the upper one's code. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(await listLinks((await regionOf(params)).id));
});

/** Says that one station lies below another. */
export const POST = route<Params>(async (request, params) => {
  const region = await regionOf(params);
  return jsonAnswer(await setLink(region.id, await readJson(request, link)), { status: 201 });
});
