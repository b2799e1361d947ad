import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { listLinks, setLink, setLinks } from '@/lib/store/links';
import { newLinks } from './bodies';

type Params = { region: string };

/** Which station lies below which, by the upper one's code. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(await listLinks((await regionOf(params)).id));
});

/** Says that one station lies below another, or that of several pairs: all of them or none. */
export const POST = route<Params>(async (request, params) => {
  const region = await regionOf(params);
  const { upstream = '', downstream = '', source, links } = await readJson(request, newLinks);
  const set = links
    ? { links: await setLinks(region.id, links) }
    : await setLink(region.id, { upstream, downstream, source });
  return jsonAnswer(set, { status: 201 });
});
