import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { removeLink } from '@/lib/store/links';

/** Takes a link between two stations away. */
export const DELETE = route<{ region: string; link: string }>(async (_request, params) => {
  const region = await regionOf(params);
  const id = Number(params.link);
  if (!Number.isInteger(id) || !(await removeLink(region.id, id))) {
    throw new Problem('not-found', `${region.name} has no link ${params.link}.`);
  }
  return new Response(null, { status: 204 });
});
