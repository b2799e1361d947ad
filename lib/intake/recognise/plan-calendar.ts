import { FixedWidthLines } from '../rows/fixed-width.ts';
import type { InspectOptions, Mapping } from '../types.ts';
import { alignedSlices } from './aligned-slices.ts';
import { type CalendarPlaces, calendarPlaces } from './calendar-places.ts';
import { firstMonthOfBlock, type Heading, yearHeadings } from './calendar-years.ts';
import { type CalendarShape, findCalendar } from './find-calendar.ts';
import { findUnit, unitProblem } from './find-unit.ts';
import { roleOfHeading } from './heading-roles.ts';
import { type LinesAbove, readLinesAbove, stationAbove } from './lines-above.ts';
import type { PlanContext } from './plan-columns.ts';
import { mappingProblem, quantityProblem, stationProblem, thousandsProblem } from './plan-problems.ts';
import { columnTexts, mostFrequent, quantityFilter, signsOf, stationOf } from './recognised-mapping.ts';
import { type SampleLine, type SampleRow, splitSample, splitterFor } from './sample.ts';
import type { TablePlan } from './table-plan.ts';
import { mixedUnits } from './unit-column.ts';

/** Rows of the sample whose values are asked for their signs and units. */
const ROWS_ASKED = 200;

/** A plan for rows of a month with a column a day, or of a day with a column a month.
 *  @returns null when the lines do not look like it and no mapping says that they are */
export function planCalendar(
  body: readonly SampleLine[],
  delimiter: string | null,
  context: PlanContext,
): TablePlan | null {
  const { options, lineEnd, marked } = context;
  const given: Partial<Mapping> = options.mapping ?? {};
  const asked = given.layout === 'month-rows' || given.layout === 'day-rows';
  if (given.layout !== undefined && !asked) return null;
  const file = options.fileName;
  const columns = splitterFor(delimiter, lineEnd);
  const words = splitSample(body, columns);
  const found = findCalendar(words);
  const shape = found !== null && (!asked || found.layout === given.layout) ? found : null;
  if (shape === null && !asked) return null;

  const leading = shape === null ? NO_COLUMNS : leadingColumns(shape, words);
  const firstRow = shape?.firstRow ?? firstDataRow(words);
  const header = shape === null ? (words[firstRow - 1]?.fields ?? null) : shape.header;
  const titles = words
    .slice(0, firstRow)
    .map((row, at) => ({ text: body[at].text, row }))
    .filter(({ row }) => row.fields !== header);
  const above = readLinesAbove(context.remarks, titles, delimiter);
  const headings = shape === null ? [] : yearHeadings(words, context.remarks, shape);
  const aligned = delimiter === null && shape !== null ? alignedSlices(body, shape) : null;
  const mapping = { ...recognised(shape, { leading, above, headings, words, options, delimiter, aligned }), ...given };
  mapping.unit =
    options.unit ??
    given.unit ??
    findUnit({ headings: [], unitText: mostFrequent(columnTexts(words, leading.unit)), ...above });

  const { yearBegins } = mapping.date;
  const firstMonth = yearBegins?.month ?? shape?.firstMonth ?? 1;
  const places = calendarPlaces(mapping, header, firstMonth, file);
  const splitter = places.slices === null ? columns : new FixedWidthLines(places.slices, lineEnd);
  const rows = places.slices === null ? words : splitSample(body, splitter);
  const data = rows.slice(firstRow);
  const stationColumn = mapping.station.from === 'column' ? mapping.station.column : -1;
  const station = typeof stationColumn === 'number' ? stationColumn : (header?.indexOf(stationColumn) ?? -1);
  const whereColumn = mapping.where?.column ?? -1;
  const where = typeof whereColumn === 'number' ? whereColumn : (header?.indexOf(whereColumn) ?? -1);
  const tablePlaces = {
    date: [places.year, places.row].filter((at) => at >= 0),
    ...{ station, value: places.cells[0].value, flag: places.cells[0].flag ?? -1, where },
    unit: places.slices === null ? leading.unit : -1,
  };
  const values = data.slice(0, ROWS_ASKED).flatMap((row) => places.cells.map(({ value }) => row.fields[value] ?? ''));
  const { signs, open } = signsOf(
    values.filter((text) => text !== ''),
    given,
  );
  Object.assign(mapping, signs);
  const lastHeading = headings.filter(({ at }) => at < firstRow).at(-1);
  const shown = rows.slice(Math.max(0, firstRow - 1), firstRow + 7);
  return {
    ...{ file, mapping, splitter, lineEnd, marked, header, places: tablePlaces, wide: null },
    ...(context.sign === null ? {} : { comment: new TextEncoder().encode(context.sign) }),
    firstLine: rows[firstRow]?.line ?? 1,
    fieldCount: places.slices?.length ?? Math.max(header?.length ?? 0, lastField(places) + 1),
    leastFields: Math.max(...tablePlaces.date, station, tablePlaces.value) + 1,
    unitText: mostFrequent(columnTexts(data, tablePlaces.unit)),
    orderOpen: false,
    repeatsHeader: false,
    preview: shown.map(({ fields }) => fields),
    previewLines: shown.map(({ line }) => line),
    valueCandidates: [],
    calendar: {
      ...{ cells: places.cells, year: places.year, row: places.row, headings: mapping.date.year === 'heading' },
      firstYear: typeof mapping.date.year === 'number' ? mapping.date.year : yearGone(lastHeading, mapping),
      begins: yearBegins ?? { month: 1, named: 'first' },
    },
    facts: above.facts,
    problems: [
      ...[mixedUnits(file, data, tablePlaces, header, null)].flatMap((problem) => problem ?? []),
      ...yearProblems(file, mapping, headings, firstMonth, header),
      ...(leading.quantity >= 0 && !mapping.where ? [quantityProblem(file, header?.[leading.quantity] ?? '')] : []),
      ...(open === null ? [] : [thousandsProblem(file, open)]),
      ...(mapping.unit === null ? [unitProblem(file, null)] : []),
      ...(mapping.station.from === 'lines-above' && stationAbove(above.facts, options.knownStations) === null
        ? [stationProblem(file)]
        : []),
    ],
    warnings: [],
  };
}

interface LeadingColumns {
  station: number;
  unit: number;
  quantity: number;
}
const NO_COLUMNS: LeadingColumns = { station: -1, unit: -1, quantity: -1 };

/** The columns beside year, month and cells, by their headings; without a header, what stands before the year is the
 *  station. */
function leadingColumns(shape: CalendarShape, words: readonly SampleRow[]): LeadingColumns {
  const { header, year, row, cells } = shape;
  const last = cells[cells.length - 1];
  const isCell = (at: number) => at >= cells[0].value && at <= (last.flag ?? last.value);
  if (header === null) return { ...NO_COLUMNS, station: year > 0 ? 0 : -1 };
  const ofRole = (...roles: string[]) =>
    header.findIndex((text, at) => !isCell(at) && at !== year && at !== row && roles.includes(roleOfHeading(text)));
  const station = ofRole('station');
  const maybe = station < 0 ? ofRole('maybe-station') : station;
  const filled = columnTexts(words.slice(shape.firstRow), maybe).length > 0;
  return { station: filled ? maybe : -1, unit: ofRole('unit'), quantity: ofRole('quantity') };
}

interface Found {
  leading: LeadingColumns;
  above: LinesAbove;
  headings: readonly Heading[];
  words: readonly SampleRow[];
  options: InspectOptions;
  delimiter: string | null;
  aligned: ReturnType<typeof alignedSlices>;
}

/** The mapping as recognised. Without a shape, all that is not given is open. */
function recognised(shape: CalendarShape | null, found: Found): Mapping {
  const { leading, above, headings, words, options, delimiter, aligned } = found;
  const roles = { wide: null, station: leading.station < 0 ? null : leading.station };
  const base: Mapping = {
    layout: shape?.layout ?? 'month-rows',
    station: stationOf(roles, options, above.facts),
    date: { columns: [], order: 'ymd' },
    ...{ value: null, flag: null, unit: null, missing: [], decimal: '.' },
    ...(delimiter === null ? {} : { delimiter }),
  };
  if (shape === null) return base;
  const combined = shape.layout === 'month-rows' && shape.year < 0 && !isPlainMonth(words[shape.firstRow], shape.row);
  const spot = aligned === null ? [shape.year, shape.row] : [aligned.year ?? -1, aligned.row];
  const flag = shape.cells[0].flag;
  const begins = beginsOf(shape, words, headings);
  const where =
    leading.quantity < 0 ? null : quantityFilter(leading.quantity, words.slice(shape.firstRow), above.remarks);
  return {
    ...base,
    date: {
      columns: spot.filter((place) => place !== -1),
      order: 'ymd',
      ...(shape.year < 0 && !combined ? { year: 'heading' as const } : {}),
      ...(begins === null ? {} : { yearBegins: begins }),
    },
    value: aligned === null ? { column: shape.cells[0].value } : { slice: aligned.value },
    flag: flag === null ? null : { column: flag },
    ...(where === null ? {} : { where }),
  };
}

const isPlainMonth = (row: SampleRow, column: number): boolean =>
  /^(?:\d{1,2}|\p{L}+\.?)$/u.test(row.fields[column] ?? '');

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

function yearGone(heading: Heading | undefined, mapping: Mapping): number | null {
  if (heading === undefined) return null;
  return heading.spans && mapping.date.yearBegins?.named === 'last' ? heading.year + 1 : heading.year;
}

function yearProblems(
  file: string,
  { date, layout }: Mapping,
  headings: readonly Heading[],
  firstMonth: number,
  header: readonly string[] | null,
) {
  const columns = JSON.stringify(date.columns);
  if (date.columns.length === 0) {
    return [mappingProblem(file, `no column is known to hold the ${layout === 'month-rows' ? 'month' : 'day'}`)];
  }
  if (date.year === 'heading' && headings.length === 0) {
    const remedy = `Say it in a mapping such as {"date": {"columns": ${columns}, "order": "ymd", "year": 1987}}`;
    return [mappingProblem(file, 'no column, and no line above the rows, says their year', undefined, remedy)];
  }
  if (layout === 'day-rows' && firstMonth !== 1 && date.yearBegins === undefined) {
    const year = date.year === undefined ? '' : `, "year": ${JSON.stringify(date.year)}`;
    const remedy = `Say it in a mapping: {"date": {"columns": ${columns}, "order": "ymd"${year}, "yearBegins": {"month": ${firstMonth}, "named": "last"}}}, or "first"`;
    const message =
      'the years do not begin in January; whether the year of their first or of their last month names them is not said';
    return [mappingProblem(file, message, header?.join(', ').slice(0, 200), remedy)];
  }
  return [];
}

function lastField({ cells }: CalendarPlaces): number {
  const last = cells[cells.length - 1];
  return Math.max(last.value, last.flag ?? -1);
}

/** The first row of a table whose layout only its mapping knows: the first with as many fields as such rows have. */
function firstDataRow(rows: readonly SampleRow[]): number {
  const found = rows.findIndex(
    ({ fields }) => fields.length > 12 && fields.slice(0, 4).some((field) => /^\d+$/.test(field)),
  );
  return Math.max(0, found);
}
