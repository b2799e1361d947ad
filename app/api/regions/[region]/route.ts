import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { parseBasis } from '@/lib/basis';
import { deleteRegion, renameRegion, setRegionBasis, setRegionTiles } from '@/lib/store/regions';
import { regionChange } from '../bodies';
import { regionAnswer } from '../region-answer';

type Params = { region: string };

/** A region with its own basis. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(regionAnswer(await regionOf(params)));
});

/** Changes a region's name, map background or own basis. */
export const PATCH = route<Params>(async (request, params) => {
  const { name, tiles, basis } = await readJson(request, regionChange);
  let region = await regionOf(params);
  if (basis !== undefined) region = await setRegionBasis(region.slug, parseBasis(basis, region.basis));
  if (tiles !== undefined) region = await setRegionTiles(region.slug, tiles);
  if (name !== undefined) region = await renameRegion(region.slug, name);
  return jsonAnswer(regionAnswer(region));
});

/** Takes a region away with all that it holds. */
export const DELETE = route<Params>(async (_request, params) => {
  const region = await regionOf(params);
  await deleteRegion(region.slug);
  return new Response(null, { status: 204 });
});
