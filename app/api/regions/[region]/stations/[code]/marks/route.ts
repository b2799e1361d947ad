import { attachment, csvAnswer, jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { parseIsoDate } from '@/lib/calendar/day';
import { marksCsv } from '@/lib/export/findings-csv';
import { launchPendingChecks } from '@/lib/jobs/checks';
import { markView } from '@/lib/jobs/finding-rows';
import { addMark, listMarks } from '@/lib/store/marks';
import { markParameters, newMark } from './bodies';

/** The marks that people laid on a station's record, in the order in which they hold. */
export const GET = route<StationParams>(async (request, params) => {
  const { format, quantity } = readParameters(request, markParameters);
  const region = await regionOf(params);
  const { id, code } = await stationOf(region, params);
  const marks = await listMarks(id, quantity);
  return format === 'csv'
    ? csvAnswer(marksCsv(marks), attachment(`${region.slug}-${code}-marks.csv`))
    : jsonAnswer({ marks: marks.map(markView) });
});

/** Rejects, accepts or notes a stretch of days. */
export const POST = route<StationParams>(async (request, params) => {
  const region = await regionOf(params);
  const { id: stationId } = await stationOf(region, params);
  const { first, last, ...mark } = await readJson(request, newMark);
  const added = await addMark({ ...mark, stationId, firstDay: parseIsoDate(first), lastDay: parseIsoDate(last) });
  // Records derived from this one are other records now.
  await launchPendingChecks([region.id]);
  return jsonAnswer(markView(added), { status: 201 });
});
