import { jsonAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { listLayers } from '@/lib/store/layers';

/** The map layers of a region, without their shapes. */
export const GET = route<{ region: string }>(async (request, params) => {
  readParameters(request, {});
  const region = await regionOf(params);
  return jsonAnswer(await listLayers(region.id));
});
