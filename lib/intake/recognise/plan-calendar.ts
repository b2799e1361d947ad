import { columnPosition } from '../mapping.ts';
import { FixedWidthLines } from '../rows/fixed-width.ts';
import type { Mapping } from '../types.ts';
import { alignedSlices } from './aligned-slices.ts';
import { calendarMapping, leadingColumns } from './calendar-mapping.ts';
import { type CalendarPlaces, calendarPlaces } from './calendar-places.ts';
import { calendarProblems } from './calendar-problems.ts';
import { firstMonthOfBlock, type Heading, yearHeadings } from './calendar-years.ts';
import { type CalendarShape, findCalendar } from './find-calendar.ts';
import { unitProblem } from './find-unit.ts';
import { readLinesAbove, stationAbove } from './lines-above.ts';
import type { PlanContext } from './plan-columns.ts';
import { centuryProblem, quantityProblem, stationProblem, thousandsProblem } from './plan-problems.ts';
import { columnTexts, mostFrequent, signsOf } from './recognised-mapping.ts';
import { type SampleLine, type SampleRow, splitSample, splitterFor } from './sample.ts';
import { SHOWN_ROWS, type TablePlan } from './table-plan.ts';
import { mixedUnits } from './unit-column.ts';

/** Rows of the sample whose values are asked for their signs. */
const ROWS_ASKED = 200;

/** A plan for rows of a month with a column a day, or of a day with a column a month.
 *  @returns null when the lines do not look like it and no mapping says that they are */
export function planCalendar(
  body: readonly SampleLine[],
  delimiter: string | null,
  context: PlanContext,
): TablePlan | null {
  const { options, lineEnd, marked } = context;
  const read = readShape(body, delimiter, context);
  if (read === null) return null;
  const { words, shape, firstRow, firstLine, header, above, headings, leading, mapping } = read;
  const file = options.fileName;
  const firstMonth = mapping.date.yearBegins?.month ?? (shape === null ? 1 : firstMonthOf(shape, words, headings));
  const open = calendarProblems(file, mapping, headings, { firstMonth, header });
  const days = calendarPlaces(mapping, header, mapping.layout === 'day-rows' ? firstMonth : 1, file);
  const splitter = days.slices === null ? splitterFor(delimiter, lineEnd) : new FixedWidthLines(days.slices, lineEnd);
  const rows = days.slices === null ? words : splitSample(body, splitter);
  const { station, where } = mapping;
  const places = placesOf(mapping, days, { header, unit: days.slices === null ? leading.unit : -1, file });
  const data = rows
    .slice(firstRow)
    .filter(({ fields }) => where === undefined || fields[places.where] === where.equals);
  const { signs, open: unclear } = signsOf(valuesIn(data, days), options.mapping);
  Object.assign(mapping, signs);
  const shortYear = mapping.firstYear === undefined ? shortYearIn(data, days.year) : null;
  const mixed = mixedUnits(file, data, places, header, null);
  const unnamed = station.from === 'lines-above' && stationAbove(above.facts, options.knownStations) === null;
  const shown = rows.slice(Math.max(0, firstRow - 1), firstRow + SHOWN_ROWS);
  return {
    ...{ file, mapping, splitter, lineEnd, marked, header, places, wide: null },
    ...(context.sign === null ? {} : { comment: new TextEncoder().encode(context.sign) }),
    firstLine,
    fieldCount: days.slices?.length ?? Math.max(header?.length ?? 0, lastField(days) + 1),
    leastFields: Math.max(...places.date, places.station, places.value) + 1,
    unitText: mostFrequent(columnTexts(data, places.unit)),
    orderOpen: false,
    repeatsHeader: false,
    preview: shown.map(({ fields }) => fields),
    previewLines: shown.map(({ line }) => line),
    valueCandidates: [],
    calendar: {
      ...{ cells: days.cells, year: days.year, row: days.row, headings: mapping.date.year === 'heading' },
      firstYear: firstYearOf(mapping, headings, firstRow),
      begins: mapping.date.yearBegins ?? { month: 1, named: 'first' },
    },
    ...{ facts: above.facts, codesAbove: above.codes },
    problems: [
      ...(mixed === null ? [] : [mixed]),
      ...open,
      ...(shortYear === null ? [] : [centuryProblem(file, shortYear)]),
      ...(leading.quantity < 0 || where ? [] : [quantityProblem(file, header?.[leading.quantity] ?? '')]),
      ...(unclear === null ? [] : [thousandsProblem(file, unclear)]),
      ...(mapping.unit === null ? [unitProblem(file, null, mapping.quantity)] : []),
      ...(unnamed ? [stationProblem(file)] : []),
    ],
    warnings: [],
  };
}

/** What the lines show of their layout, and the mapping that follows from it and from what is given.
 *  @returns null when they are no calendar and no mapping says that they are */
function readShape(body: readonly SampleLine[], delimiter: string | null, { options, lineEnd, comments }: PlanContext) {
  const asked = options.mapping?.layout === 'month-rows' || options.mapping?.layout === 'day-rows';
  if (options.mapping?.layout !== undefined && !asked) return null;
  const words = splitSample(body, splitterFor(delimiter, lineEnd));
  const found = findCalendar(words);
  const shape = found !== null && (!asked || found.layout === options.mapping?.layout) ? found : null;
  if (shape === null && !asked) return null;

  const firstRow = shape?.firstRow ?? firstDataRow(words);
  const header = shape === null ? (words[firstRow - 1]?.fields ?? null) : shape.header;
  const titles = words.flatMap((row, at) =>
    at < firstRow && row.fields !== header ? [{ text: body[at].text, row }] : [],
  );
  const firstLine = words[firstRow]?.line ?? 1;
  const above = readLinesAbove(comments, titles, { delimiter, firstLine });
  const remarks = comments.filter(({ line }) => line < firstLine).map(({ text }) => text);
  const headings = shape === null ? [] : yearHeadings(words, remarks, shape);
  const aligned = delimiter === null && shape !== null ? alignedSlices(body, shape) : null;
  const leading = leadingColumns(shape, words);
  const mapping = calendarMapping(shape, { leading, above, headings, words, options, delimiter, aligned });
  return { words, shape, firstRow, firstLine, header, above, headings, leading, mapping };
}

function placesOf(
  { station, where }: Mapping,
  { year, row, cells }: CalendarPlaces,
  { header, unit, file }: { header: readonly string[] | null; unit: number; file: string },
): TablePlan['places'] {
  return {
    date: [year, row].filter((at) => at >= 0),
    station: station.from === 'column' ? columnPosition(station.column, header, file) : -1,
    value: cells[0]?.value ?? -1,
    flag: cells[0]?.flag ?? -1,
    where: where === undefined ? -1 : columnPosition(where.column, header, file),
    unit,
  };
}

/** The month with which the years of a layout begin, where it shows. */
function firstMonthOf(shape: CalendarShape, words: readonly SampleRow[], headings: readonly Heading[]): number {
  const besideMonth = shape.layout === 'month-rows' && shape.year >= 0;
  return besideMonth ? 1 : firstMonthOfBlock(words, shape, headings);
}

const valuesIn = (data: readonly SampleRow[], { cells }: CalendarPlaces): string[] =>
  data
    .slice(0, ROWS_ASKED)
    .flatMap(({ fields }) => cells.map(({ value }) => fields[value] ?? ''))
    .filter((text) => text !== '');

/** A year of two digits, where most rows have one; null where they do not. */
function shortYearIn(data: readonly SampleRow[], column: number): string | null {
  const years = columnTexts(data, column).filter((text) => /^\d+$/.test(text));
  const short = years.filter((text) => text.length <= 2);
  return short.length * 2 > years.length ? short[0] : null;
}

/** The year of the first rows, where no column holds it: as given, or of the last heading above them. */
function firstYearOf({ date }: Mapping, headings: readonly Heading[], firstRow: number): number | null {
  if (typeof date.year === 'number') return date.year;
  const heading = headings.findLast(({ at }) => at < firstRow);
  if (heading === undefined) return null;
  return heading.spans && date.yearBegins?.named === 'last' ? heading.year + 1 : heading.year;
}

function lastField({ cells }: CalendarPlaces): number {
  const last = cells[cells.length - 1];
  return last === undefined ? 0 : Math.max(last.value, last.flag ?? -1);
}

/** The first row of a table whose layout only its mapping knows: the first with as many fields as such rows have. */
function firstDataRow(rows: readonly SampleRow[]): number {
  const isData = (fields: readonly string[]) =>
    fields.length > 12 && fields.slice(0, 4).some((field) => /^\d+$/.test(field));
  return Math.max(
    0,
    rows.findIndex(({ fields }) => isData(fields)),
  );
}
