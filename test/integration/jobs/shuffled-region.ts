import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { editStation } from '../../../lib/store/station-edit.ts';
import { seeded } from '../../seeded.ts';
import { ownDatabase } from '../own-database.ts';

const FIRST_YEAR = 1990;
const YEARS = 24;
const FIRST_DAY = dayNumber(FIRST_YEAR, 1, 1);
const LAST_DAY = dayNumber(FIRST_YEAR + YEARS - 1, 12, 31);

/** Twelve stations of perennial rivers, and one that falls dry every second year. */
export const CODES = [...Array.from({ length: 12 }, (_, i) => `P${i + 1}`), 'DRY'];

const yearOf = (day: number): number => Math.min(YEARS - 1, Math.floor((day - FIRST_DAY) / 365.25));

/** Levels of a station's years: half of them from the weather that all share, carried over from year to year, and a slow
 *  change of its own. */
function levelsOf(station: number): number[] {
  const [shared, own] = [seeded(7), seeded(100 + station)];
  let carried = 0.5;
  return Array.from({ length: YEARS }, (_, year) => {
    carried = 0.6 * carried + 0.2 * shared() + 0.2 * own();
    return 0.4 + carried - 0.003 * station * year;
  });
}

function flowsOf(code: string): string[] {
  const station = CODES.indexOf(code);
  const levels = levelsOf(station);
  const rows: string[] = [];
  for (let day = FIRST_DAY; day <= LAST_DAY; day += 1) {
    const season = 1.2 + Math.cos((2 * Math.PI * (day - FIRST_DAY)) / 365.25 - 1);
    const flow = season * levels[yearOf(day)];
    const isDry = code === 'DRY' && yearOf(day) % 2 === 0 && flow < 0.3 + 0.02 * yearOf(day);
    rows.push(`${code},${isoDate(day)},${isDry ? '0' : flow.toFixed(3)}`);
  }
  return rows;
}

/** P1 and P2 lie on one river. */
const registryRow = (code: string): string => {
  const i = CODES.indexOf(code);
  const influence = i % 3 === 2 ? 'regulated' : 'natural';
  return `${code},Weir ${code},${i < 2 ? 'Wethe' : `Brook ${i}`},50.${10 + i},7.${10 + (i % 5)},${100 + 15 * i},${influence}`;
};

function rain(): string {
  const random = seeded(3);
  const rows = ['station,date,depth'];
  for (let day = FIRST_DAY; day <= LAST_DAY; day += 1) {
    rows.push(`P3,${isoDate(day)},${random() < 0.3 ? (10 * random()).toFixed(1) : 0}`);
  }
  return `${rows.join('\n')}\n`;
}

/** Runs `ask` on the region "Upper Wethe" in a database of its own, made for it: its stations have come one import after
 *  the other in the order given, after those of another region when `second`. */
export async function inShuffledRegion<Answer>(
  order: readonly string[],
  second: boolean,
  ask: (region: RegionRow) => Promise<Answer>,
): Promise<Answer> {
  const { folder, giveBack } = await ownDatabase('shuffled');
  try {
    if (second) await take(folder, await createRegion({ name: 'Another' }), order.slice(0, 3));
    const region = await createRegion({ name: 'Upper Wethe' });
    await take(folder, region, order.slice(0, 5));
    await take(folder, region, order.slice(5));
    const mapping = { quantity: 'rainfall' as const, unit: 'mm' as const, value: { column: 'depth' } };
    await importFile(folder, region, 'rain.csv', rain(), { all: { mapping } });
    await editStation(region.id, 'P3', { changes: [{ date: '2001-07-01', kind: 'dam', note: '' }] });
    return await ask(region);
  } finally {
    await giveBack();
  }
}

async function take(folder: string, region: RegionRow, codes: readonly string[]): Promise<void> {
  const head = 'station_id,name,river,latitude,longitude,drainage_area_km2,influence';
  await importFile(folder, region, 'stations.csv', `${[head, ...codes.map(registryRow)].join('\n')}\n`);
  const rows = codes.flatMap(flowsOf);
  await importFile(folder, region, 'flows.csv', `station,date,discharge_m3s\n${rows.join('\n')}\n`);
}

async function importFile(folder: string, region: RegionRow, name: string, text: string, choices = {}): Promise<void> {
  const path = join(folder, name);
  writeFileSync(path, text);
  await (await launchImport({ region: { id: region.id }, files: [{ path, name }], choices })).result;
}
