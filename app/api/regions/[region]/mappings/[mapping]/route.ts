import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { removeMapping } from '@/lib/store/saved-mappings';

/** Takes a kept mapping away. What was read by it stays. */
export const DELETE = route<{ region: string; mapping: string }>(async (_request, params) => {
  const region = await regionOf(params);
  const id = Number(params.mapping);
  if (!Number.isInteger(id) || !(await removeMapping(region.id, id))) {
    throw new Problem('not-found', `${region.name} has no mapping ${params.mapping}.`);
  }
  return new Response(null, { status: 204 });
});
