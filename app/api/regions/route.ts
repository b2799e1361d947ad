import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { route } from '@/app/api/_http/route';
import { createRegion, listRegions } from '@/lib/store/regions';
import { newRegion } from './bodies';
import { regionAnswer } from './region-answer';

/** All regions with what they hold. */
export const GET = route(async (request) => {
  readParameters(request, {});
  return jsonAnswer(await listRegions());
});

/** Makes an empty region. */
export const POST = route(async (request) => {
  const region = await createRegion(await readJson(request, newRegion));
  return jsonAnswer(regionAnswer(region), {
    status: 201,
    headers: { location: `/api/regions/${encodeURIComponent(region.slug)}` },
  });
});
