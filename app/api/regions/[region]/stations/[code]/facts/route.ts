import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { stationAnswer } from '../../station-answer';

/** What is known of a station: facts, dated changes, named flows, notes, recipe. */
export const GET = route<StationParams>(async (request, params) => {
  readParameters(request, {});
  return stationAnswer(await stationOf(await regionOf(params), params));
});
