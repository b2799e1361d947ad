import { jsonAnswer } from '@/app/api/_http/answer';
import { editionOf } from '@/lib/store/station-edition';
import type { StationRow } from '@/lib/store/stations';

/** All that can be edited of a station, under the entity tag that a change of it is asked to name. */
export function stationAnswer(station: StationRow, status = 200): Response {
  const { id: _own, ...facts } = station;
  return jsonAnswer(facts, { status, headers: { etag: `"${editionOf(station)}"` } });
}
