import { attachment, csvAnswer, jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { marksCsv } from '@/lib/export/findings-csv';
import { launchPendingChecks } from '@/lib/jobs/checks';
import { markView } from '@/lib/jobs/finding-rows';
import { addMarks, listMarks } from '@/lib/store/marks';
import { markParameters, newMark, stretchesOf } from './bodies';

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

/** Rejects, accepts or notes a stretch of days, or several stretches at once: all of them or none. */
export const POST = route<StationParams>(async (request, params) => {
  const region = await regionOf(params);
  const { id: stationId } = await stationOf(region, params);
  const body = await readJson(request, newMark);
  const { kind, reason, by, quantity } = body;
  const added = await addMarks({ stationId, kind, reason, by, quantity, stretches: stretchesOf(body) });
  // Records derived from this one are other records now.
  await launchPendingChecks([region.id]);
  const marks = added.map(markView);
  return jsonAnswer(body.stretches ? { marks } : marks[0], { status: 201 });
});
