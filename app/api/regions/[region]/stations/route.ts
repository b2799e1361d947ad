import { createHash } from 'node:crypto';
import { taggedAnswer } from '@/app/api/_http/answer';
import { narrowingOf, readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { stationsProduct } from '@/lib/export/stations-product';
import { launchPendingChecks } from '@/lib/jobs/checks';
import { addStation } from '@/lib/store/station-edit';
import { listStations } from '@/lib/store/stations';
import { newStation } from './bodies';
import { stationParameters } from './parameters';
import { stationAnswer } from './station-answer';

/** The stations of a region with their facts. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, ...narrow } = readParameters(request, stationParameters);
  const region = await regionOf(params);
  const text = stationsProduct(format, await listStations(region.id), narrowingOf(narrow));
  const tag = createHash('sha256').update(text).digest('hex');
  return taggedAnswer(request, { tag, type: format }, () => text);
});

/** Adds a station by hand: without days as yet, or derived from others. */
export const POST = route<{ region: string }>(async (request, params) => {
  const station = await readJson(request, newStation);
  const region = await regionOf(params);
  const added = await addStation(region.id, station);
  // A derived record is checked like any other.
  await launchPendingChecks([region.id]);
  return stationAnswer(added, 201);
});
