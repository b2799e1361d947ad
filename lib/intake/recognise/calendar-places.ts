import { columnPosition } from '../mapping.ts';
import type { FieldPlace, Mapping } from '../types.ts';
import type { CalendarCell } from './calendar-plan.ts';
import type { Slice } from './fixed-slices.ts';
import { mappingProblem } from './plan-problems.ts';

/** Where a mapping has the days of a calendar layout, worked out to positions. */
export interface CalendarPlaces {
  cells: CalendarCell[];
  /** −1 where no column holds the year alone */
  year: number;
  row: number;
  /** non-null for rows at fixed characters: year, row and cells in this order */
  slices: Slice[] | null;
}

/** Columns of a calendar layout, in the order of their days or months. */
const cellCount = (layout: Mapping['layout']): number => (layout === 'month-rows' ? 31 : 12);

/** @param firstMonth  month of the first column of a row a day
 *  @throws IntakeError for columns that the header does not have, and for places that do not go together */
export function calendarPlaces(
  mapping: Mapping,
  header: readonly string[] | null,
  firstMonth: number,
  file: string,
): CalendarPlaces {
  const { layout, date, value, flag } = mapping;
  const count = cellCount(layout);
  const number = (at: number) => (layout === 'month-rows' ? at + 1 : ((firstMonth - 1 + at) % 12) + 1);
  // What is not known is asked for; until then there are no days.
  if (value === null || date.columns.length === 0) return { cells: [], year: -1, row: -1, slices: null };
  if (date.columns.length > 2) throw mappingProblem(file, 'a calendar layout has no column of days for its date');
  const isFixed = 'slice' in value;
  const position = (place: number | string | [number, number]): number => {
    if (!isFixed && typeof place !== 'object') return columnPosition(place, header, file);
    throw mappingProblem(file, 'a mapping gives either columns or characters, not both');
  };
  if (!isFixed) {
    const at = date.columns.map(position);
    const first = position(value.column);
    const firstFlag = flag === null ? null : position('slice' in flag ? flag.slice : flag.column);
    const step = firstFlag === null ? 1 : 2;
    const cells = Array.from({ length: count }, (_, cell) => ({
      number: number(cell),
      value: first + cell * step,
      flag: firstFlag === null ? null : firstFlag + cell * step,
    }));
    return { cells, year: at.length === 2 ? at[0] : -1, row: at[at.length - 1], slices: null };
  }
  const slices = date.columns.map((place) => (Array.isArray(place) ? place : [position(place), 0])) as Slice[];
  const [start, end] = value.slice;
  const flagSlice = flag === null ? null : sliceOf(flag, file);
  const width = Math.max(end, flagSlice?.[1] ?? 0) - Math.min(start, flagSlice?.[0] ?? start);
  const cells = Array.from({ length: count }, (_, cell) => {
    const moved = ([from, to]: readonly [number, number]): Slice => [from + cell * width, to + cell * width];
    const at = slices.push(moved(value.slice)) - 1;
    return { number: number(cell), value: at, flag: flagSlice === null ? null : slices.push(moved(flagSlice)) - 1 };
  });
  const both = date.columns.length === 2;
  return { cells, year: both ? 0 : -1, row: both ? 1 : 0, slices };
}

function sliceOf(place: FieldPlace, file: string): Slice {
  if ('slice' in place) return place.slice;
  throw mappingProblem(file, 'a mapping gives either columns or characters, not both');
}
