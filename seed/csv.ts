import { once } from 'node:events';
import { createWriteStream } from 'node:fs';
import { finished } from 'node:stream/promises';
import { isoDate } from '../lib/calendar/day.ts';
import { NO_ROW } from '../lib/series/day-codes.ts';
import type { SeedRecord, SeedStation } from './generate.ts';

/** Writes records as one long table, station,date,flow,flag, flows in m³/s; a day without a value has an empty flow, a day
 *  without a row has none. One record is in memory at a time.
 *  @returns rows written, the header not counted */
export async function writeFlowsCsv(
  path: string,
  records: Iterable<Omit<SeedRecord, 'beside' | 'marks'>>,
): Promise<number> {
  const out = createWriteStream(path, { highWaterMark: 1 << 20 });
  // A write that fails surfaces at `finished` as well; listening keeps it from ending the process before.
  const done = finished(out);
  done.catch(() => undefined);
  const dates = new Map<number, string>();
  const dateOf = (day: number) => {
    let text = dates.get(day);
    if (text === undefined) {
      text = isoDate(day);
      dates.set(day, text);
    }
    return text;
  };
  let rows = 0;
  out.write('station,date,flow,flag\n');
  for (const { code, firstDay, values, codes, codeList } of records) {
    const lines: string[] = [];
    for (let i = 0; i < values.length; i += 1) {
      if (codes[i] === NO_ROW) continue;
      const flow = Number.isNaN(values[i]) ? '' : String(values[i]);
      lines.push(`${code},${dateOf(firstDay + i)},${flow},${codeList[codes[i]].text}`);
    }
    rows += lines.length;
    if (!out.write(`${lines.join('\n')}\n`)) await Promise.race([once(out, 'drain'), done]);
  }
  out.end();
  await done;
  return rows;
}

/** The station registry as CSV. */
export function registryCsv(stations: readonly SeedStation[]): string {
  const rows = stations.map(({ code, name, river, latitude, longitude, areaKm2, influence }) =>
    [code, name, river, latitude, longitude, areaKm2 ?? '', influence].join(','),
  );
  return `${['code,name,river,latitude,longitude,drainage_area_km2,influence', ...rows].join('\n')}\n`;
}
