import { attachment, taggedAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { isoDate, parseIsoDate } from '@/lib/calendar/day';
import { daysCsv } from '@/lib/export/days-csv';
import { jsonText } from '@/lib/export/json';
import { quantityWords } from '@/lib/series/quantities';
import { stationDays } from '@/lib/store/station-days';
import { daysParameters } from './parameters';

/** A hundred years, the longest stretch that is answered at once. */
const MOST_DAYS = 36_525;

/** The days of one station over a stretch: values in the unit shown, flags, and the quality codes as the file wrote
 *  them. */
export const GET = route<StationParams>(async (request, params) => {
  const { first, last, quantity, format } = readParameters(request, daysParameters);
  const region = await regionOf(params);
  const { id, code } = await stationOf(region, params);
  const [from, to] = [parseIsoDate(first), parseIsoDate(last)];
  if (to < from) throw new Problem('bad-parameter', `"last" (${last}) must not come before "first" (${first}).`);
  if (to - from >= MOST_DAYS) {
    throw new Problem('bad-parameter', `${first} to ${last} is more than 100 years: ask for them in two stretches.`);
  }
  const days = stationDays({ stationId: id, quantity, first: from, last: to });
  if (!days) throw new Problem('not-found', `${code} has no daily ${quantityWords(quantity)}.`);
  const tag = `${days.hash}-${first}-${last}-${quantity}-${format}`;
  const headers = format === 'csv' ? attachment(`${region.slug}-${code}-${quantity}-${first}-${last}.csv`) : undefined;
  return taggedAnswer(request, { tag, type: format, headers }, () => {
    if (format === 'csv') return daysCsv(code, days);
    return jsonText({
      station_code: code,
      quantity,
      unit: days.unit,
      dates: Array.from(days.values, (_, i) => isoDate(days.firstDay + i)),
      values: Array.from(days.values, (value) => (Number.isNaN(value) ? null : value)),
      flags: days.flags,
      texts: days.texts,
    });
  });
});
