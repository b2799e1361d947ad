import type { InspectOptions, Mapping } from '../types.ts';
import type { AlignedSlices } from './aligned-slices.ts';
import { firstMonthOfBlock, type Heading } from './calendar-years.ts';
import type { CalendarShape } from './find-calendar.ts';
import { findUnit } from './find-unit.ts';
import { roleOfHeading } from './heading-roles.ts';
import type { LinesAbove } from './lines-above.ts';
import { columnTexts, mostFrequent, quantityFilter, stationOf } from './recognised-mapping.ts';
import type { SampleRow } from './sample.ts';

/** Columns of a calendar layout beside those of year, month and days; −1 where there is none. */
export interface LeadingColumns {
  station: number;
  unit: number;
  quantity: number;
}

/** Finds them by their headings; without a header, what stands before the year is the station. */
export function leadingColumns(shape: CalendarShape | null, words: readonly SampleRow[]): LeadingColumns {
  if (shape === null) return { station: -1, unit: -1, quantity: -1 };
  const { header, year, row, cells } = shape;
  if (header === null) return { station: year > 0 ? 0 : -1, unit: -1, quantity: -1 };
  const last = cells[cells.length - 1];
  const isCell = (at: number) => at >= cells[0].value && at <= (last.flag ?? last.value);
  const ofRole = (role: string) =>
    header.findIndex((text, at) => !isCell(at) && at !== year && at !== row && roleOfHeading(text) === role);
  const named = ofRole('station');
  const station = named < 0 ? ofRole('maybe-station') : named;
  const filled = columnTexts(words.slice(shape.firstRow), station).length > 0;
  return { station: filled ? station : -1, unit: ofRole('unit'), quantity: ofRole('quantity') };
}

export interface CalendarFound {
  leading: LeadingColumns;
  above: LinesAbove;
  headings: readonly Heading[];
  words: readonly SampleRow[];
  options: InspectOptions;
  delimiter: string | null;
  aligned: AlignedSlices | null;
}

/** The mapping as recognised, with what was given laid over it. Without a shape, all that is not given is open. */
export function calendarMapping(shape: CalendarShape | null, found: CalendarFound): Mapping {
  const { leading, above, words, options, delimiter, aligned } = found;
  const roles = { wide: null, station: leading.station < 0 ? null : leading.station };
  const data = shape === null ? [] : words.slice(shape.firstRow);
  const where = leading.quantity < 0 ? null : quantityFilter(leading.quantity, data, above.remarks);
  const flag = shape?.cells[0].flag ?? null;
  const value = shape === null ? null : { column: shape.cells[0].value };
  return {
    layout: shape?.layout ?? 'month-rows',
    station: stationOf(roles, options, above.facts),
    date: shape === null ? { columns: [], order: 'ymd' } : dateOf(shape, found),
    value: aligned === null ? value : { slice: aligned.value },
    flag: flag === null ? null : { column: flag },
    missing: [],
    decimal: '.',
    ...(delimiter === null ? {} : { delimiter }),
    ...(where === null ? {} : { where }),
    ...options.mapping,
    unit:
      options.unit ??
      options.mapping?.unit ??
      findUnit({ headings: [], unitText: mostFrequent(columnTexts(data, leading.unit)), ...above }),
  };
}

function dateOf(shape: CalendarShape, { words, headings, aligned }: CalendarFound): Mapping['date'] {
  const month = words[shape.firstRow]?.fields[shape.row] ?? '';
  const hasBoth = shape.layout === 'month-rows' && shape.year < 0 && !/^(?:\d{1,2}|\p{L}+\.?)$/u.test(month);
  const places = aligned === null ? [shape.year, shape.row] : [aligned.year ?? -1, aligned.row];
  const begins = beginsOf(shape, words, headings);
  return {
    columns: places.filter((place) => place !== -1),
    order: 'ymd',
    ...(shape.year < 0 && !hasBoth ? { year: 'heading' as const } : {}),
    ...(begins === null ? {} : { yearBegins: begins }),
  };
}

/** How the years of the blocks begin, where the file says it; null for calendar years, and where it does not. */
function beginsOf(
  shape: CalendarShape,
  words: readonly SampleRow[],
  headings: readonly Heading[],
): Mapping['date']['yearBegins'] | null {
  if (shape.layout === 'month-rows' && shape.year >= 0) return null;
  const month = firstMonthOfBlock(words, shape, headings);
  if (month === 1) return null;
  if (headings.some(({ spans }) => spans)) return { month, named: 'first' };
  const heading = shape.year < 0 ? '' : (shape.header?.[shape.year] ?? '');
  // Hydrological years bear the number of the calendar year in which they end.
  const named = headings.some(({ hydrological }) => hydrological) || /water|hydro|abfluss/i.test(heading);
  return named ? { month, named: 'last' } : null;
}
