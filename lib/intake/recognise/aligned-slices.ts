import type { CalendarShape } from './find-calendar.ts';
import type { Slice } from './fixed-slices.ts';
import type { SampleLine } from './sample.ts';

/** Where the columns of a calendar table stand that is set apart by blanks, and whose empty cells are blanks too. */
export interface AlignedSlices {
  year: Slice | null;
  row: Slice;
  /** the first cell; the others follow at its width */
  value: Slice;
}

interface Word {
  start: number;
  end: number;
}

const wordsOf = (text: string): Word[] =>
  [...text.matchAll(/\S+/g)].map((found) => ({ start: found.index, end: found.index + found[0].length }));

/** Finds right-aligned columns of one width, in which every word of every row lies.
 *  @returns null where the cells do not stand so; then words in a row can only be counted */
export function alignedSlices(lines: readonly SampleLine[], shape: CalendarShape): AlignedSlices | null {
  const { cells, year, row } = shape;
  const [first, last] = [cells[0].value, cells[cells.length - 1].value];
  if (cells[0].flag !== null || row > first || year > row) return null;
  const rows = lines.map(({ text }) => wordsOf(text));
  const full = rows.find((words, at) => words.length === last + 1 && isData(lines[at].text, row));
  if (full === undefined || full.length < 2) return null;
  const ends = full.map(({ end }) => end);
  const width = ends[first + 1] - ends[first];
  const value: Slice = [ends[first] - width, ends[first]];
  const even = ends.slice(first).every((end, at) => end === ends[first] + at * width);
  if (!even || value[0] < ends[first - 1]) return null;
  const leading = ends.slice(0, first).map((end, at): Slice => [at === 0 ? 0 : ends[at - 1], end]);
  const slices = [...leading, ...cells.map((_, at): Slice => [value[0] + at * width, value[1] + at * width])];
  const inside = ({ start, end }: Word) =>
    start >= slices[slices.length - 1][1] || slices.some(([from, to]) => start >= from && end <= to);
  const fits = rows.every((words, at) => !isData(lines[at].text, row) || words.every(inside));
  return fits ? { year: year < 0 ? null : leading[year], row: leading[row], value } : null;
}

/** A line whose word in the row's place is a number, as a day or month is. */
function isData(text: string, row: number): boolean {
  return /^\d{1,2}$/.test(text.trim().split(/\s+/)[row] ?? '');
}
