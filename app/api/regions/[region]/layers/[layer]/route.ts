import { createHash } from 'node:crypto';
import { taggedAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { getLayer } from '@/lib/store/layers';

/** A map layer as GeoJSON. */
export const GET = route<{ region: string; layer: string }>(async (request, params) => {
  readParameters(request, {});
  const region = await regionOf(params);
  const id = Number(params.layer);
  const geojson = Number.isInteger(id) ? await getLayer(region.id, id) : null;
  if (geojson === null) throw new Problem('not-found', `${region.name} has no layer ${params.layer}.`);
  const tag = createHash('sha256').update(geojson).digest('hex');
  return taggedAnswer(request, { tag, type: 'geojson' }, () => geojson);
});
