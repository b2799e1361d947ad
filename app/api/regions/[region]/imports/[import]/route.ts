import { jsonAnswer } from '@/app/api/_http/answer';
import { importOf } from '@/app/api/_http/import';
import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { undo } from '@/lib/jobs/undo';

type Params = { region: string; import: string };

/** The report of an import, as it was given when the file was taken. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  const region = await regionOf(params);
  return jsonAnswer(await importOf(region, params));
});

/** Undoes an import: its values, stations and layers go, and what stood before comes back. */
export const DELETE = route<Params>(async (_request, params) => {
  const region = await regionOf(params);
  const { id } = await importOf(region, params);
  await undo(region, id);
  return new Response(null, { status: 204 });
});
