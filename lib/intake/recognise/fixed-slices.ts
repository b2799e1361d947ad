import { isDay, isMonth, isYear } from './column-facts.ts';
import type { SampleLine } from './sample.ts';

export type Slice = [number, number];

/** What the lines of a fixed-width file show: where year, month and day stand, and where numbers do. */
export interface FixedSlices {
  date: [Slice, Slice, Slice];
  values: Slice[];
}

const SHARE = 0.95;

function holds(lines: readonly SampleLine[], [start, end]: Slice, test: (text: string) => boolean): boolean {
  const good = lines.filter(({ text }) => test(text.slice(start, end).trim())).length;
  return good >= lines.length * SHARE;
}

/** Numbers are padded on their left: text that ends in a blank is a slice in the wrong place. */
function endsInDigit(lines: readonly SampleLine[], [, end]: Slice): boolean {
  return lines.filter(({ text }) => /\d/.test(text[end - 1] ?? '')).length >= lines.length * SHARE;
}

/** Year, month and day at fixed characters, side by side or one apart, starting within the first 24 characters. */
function dateSlices(lines: readonly SampleLine[]): [Slice, Slice, Slice] | null {
  for (let start = 0; start < 24; start++) {
    if (!holds(lines, [start, start + 4], isYear)) continue;
    for (const gap of [0, 1]) {
      const month: Slice = [start + 4 + gap, start + 6 + gap];
      const day: Slice = [month[1] + gap, month[1] + gap + 2];
      const aligned = [month, day].every((slice) => endsInDigit(lines, slice));
      if (aligned && holds(lines, month, isMonth) && holds(lines, day, isDay)) return [[start, start + 4], month, day];
    }
  }
  return null;
}

/** Numbers end at the same character on every line: right-aligned columns. */
function valueSlices(lines: readonly SampleLine[], from: number): Slice[] {
  const length = Math.max(...lines.map(({ text }) => text.length));
  const slices: Slice[] = [];
  let start = from;
  for (let at = from; at < length; at++) {
    const ending = lines.filter(({ text }) => (text[at] ?? ' ') !== ' ' && (text[at + 1] ?? ' ') === ' ').length;
    if (ending < lines.length * SHARE) continue;
    const slice: Slice = [start, at + 1];
    if (holds(lines, slice, (text) => text !== '' && Number.isFinite(Number(text)))) slices.push(slice);
    start = at + 1;
  }
  return slices;
}

/** A guess at a fixed-width file; null when its lines do not have a date at fixed characters and numbers behind it. */
export function findFixedSlices(lines: readonly SampleLine[]): FixedSlices | null {
  // A last line that is cut short must not hide the layout of all others.
  const whole = lines.length > 2 ? lines.slice(0, -1) : lines;
  const date = dateSlices(whole);
  if (date === null) return null;
  const values = valueSlices(whole, date[2][1]);
  return values.length > 0 ? { date, values } : null;
}
