import { closeSync, openSync, writeSync } from 'node:fs';
import { dayNumber, isoDate } from '../../lib/calendar/day.ts';
import { seeded } from '../seeded.ts';

const YEARS = 60;
const FIRST_DAY = dayNumber(1960, 1, 1);
const DAYS = Math.round(YEARS * 365.25);

/** Writes a long table of about so many bytes: whole stations one after another, or all stations day by day. */
export function writeTable(path: string, order: 'by station' | 'by day', bytes: number): void {
  const dates = Array.from({ length: DAYS }, (_, at) => isoDate(FIRST_DAY + at));
  const stations = Math.max(1, Math.round(bytes / (DAYS * 28)));
  const random = seeded(20);
  const file = openSync(path, 'w');
  let block = 'station,date,flow,flag\n';
  const row = (station: number, day: number): void => {
    const flow = Math.exp(random() * 6).toFixed(2);
    block += `${10_000_000 + station},${dates[day]},${flow},${random() < 0.05 ? 'A:e' : 'A'}\n`;
    if (block.length > 1 << 20) {
      writeSync(file, block);
      block = '';
    }
  };
  if (order === 'by station') for (let s = 0; s < stations; s++) for (let d = 0; d < DAYS; d++) row(s, d);
  else for (let d = 0; d < DAYS; d++) for (let s = 0; s < stations; s++) row(s, d);
  writeSync(file, block);
  closeSync(file);
}
