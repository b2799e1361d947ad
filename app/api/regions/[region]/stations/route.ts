import { createHash } from 'node:crypto';
import * as z from 'zod';
import { taggedAnswer } from '@/app/api/_http/answer';
import { narrowingOf, narrowingParameters, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { FORMATS } from '@/lib/export/format';
import { stationsGeojson } from '@/lib/export/geojson';
import { jsonText } from '@/lib/export/json';
import { narrowTo } from '@/lib/export/narrow';
import { stationsCsv } from '@/lib/export/stations-csv';
import { listStations } from '@/lib/store/stations';

const parameters = { format: z.enum(FORMATS).default('geojson'), ...narrowingParameters };

/** The stations of a region with their facts. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, ...narrow } = readParameters(request, parameters);
  const region = await regionOf(params);
  const stations = narrowTo(await listStations(region.id), narrowingOf(narrow), (station) => station);
  const text = { csv: stationsCsv, geojson: (all: typeof stations) => jsonText(stationsGeojson(all)), json: jsonText }[
    format
  ](stations);
  const tag = createHash('sha256').update(text).digest('hex');
  return taggedAnswer(request, { tag, type: format }, () => text);
});
