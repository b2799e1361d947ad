import { longLineError } from '../file-blocks.ts';
import type { LineSplitter } from '../rows/fields.ts';
import { type InspectOptions, IntakeError, type Layout, type Mapping } from '../types.ts';
import { agencyColumns } from './agency-columns.ts';
import { assignColumns, type ColumnRoles, type WideColumn } from './assign-columns.ts';
import { columnFacts, hasShortYear, looksLikeDate } from './column-facts.ts';
import { columnPlaces } from './column-places.ts';
import { findTableStart, headerInComment, isWidthRow, type TableStart } from './find-header.ts';
import { readLinesAbove, stationAbove } from './lines-above.ts';
import { otherQuantities } from './other-quantities.ts';
import { centuryProblem, problemsOf, stationProblem, thousandsProblem } from './plan-problems.ts';
import { columnTexts, mappingOf, mostFrequent, signsOf } from './recognised-mapping.ts';
import { type SampleLine, type SampleRow, splitSample, splitterFor, usualCount } from './sample.ts';
import { withoutSign } from './stated-facts.ts';
import { SHOWN_ROWS, type TablePlan } from './table-plan.ts';
import { mixedUnits } from './unit-column.ts';
import { unreadColumns } from './wide-columns.ts';

export interface PlanContext {
  options: InspectOptions;
  lineEnd: number;
  marked: boolean;
  /** comment lines, and the sign that they begin with where it is not `#` */
  comments: SampleLine[];
  sign: string | null;
  /** the line that runs over the end of the sample; null when the sample is the whole file */
  openLine: Uint8Array | null;
}

/** A plan for rows whose fields are set apart by a delimiter, or by blanks (`delimiter` null). */
export function planColumns(body: readonly SampleLine[], delimiter: string | null, context: PlanContext): TablePlan {
  const { options, lineEnd, marked } = context;
  const file = options.fileName;
  const splitter = splitterFor(delimiter, lineEnd);
  const rows = splitSample(body, splitter);
  const start = tableStart(rows, splitter, context.comments);
  const data = rows.slice(start.firstRow);
  refuseWithoutRows(file, rows, start, data, context.openLine);
  const { header } = start;
  const fieldCount = header?.length ?? usualCount(data);
  const titles = rows
    .slice(0, start.firstRow)
    .map((row, at) => ({ text: body[at].text, row }))
    .filter(({ row }) => row.fields !== header && !isWidthRow(row.fields));
  const above = readLinesAbove(context.comments, titles, { delimiter, firstLine: data[0].line });
  const roles = rolesOf(data, start, fieldCount, options);
  const layout = layoutOf(roles, start, delimiter);
  const mapping = mappingOf(roles, data, { header, delimiter, above, options, layout });
  const { places, wide } = columnPlaces(mapping, roles, { header, fieldCount, file });
  const { where } = mapping;
  const flows = where ? data.filter(({ fields }) => fields[places.where] === where.equals) : data;
  const valueTexts = (wide?.map(({ value }) => value) ?? [places.value]).flatMap((at) => columnTexts(flows, at));
  const { signs, open } = signsOf(valueTexts, options.mapping);
  Object.assign(mapping, signs);
  const problems = problemsOf(file, mapping, roles, header, wide);
  if (open !== null) problems.push(thousandsProblem(file, open));
  const shortYear = mapping.firstYear === undefined ? shortYearIn(data, places.date) : null;
  if (shortYear !== null) problems.push(centuryProblem(file, shortYear));
  const mixed = mixedUnits(file, flows, places, header, wide);
  if (mixed !== null) problems.unshift(mixed);
  if (mapping.station.from === 'lines-above' && stationAbove(above.facts, options.knownStations) === null)
    problems.push(stationProblem(file));

  const required = Math.max(...places.date, places.station, places.value, places.where) + 1;
  const dateTexts = places.date.length === 1 ? columnTexts(data, places.date[0]) : [];
  const shown = rows.slice(Math.max(0, start.firstRow - 1), start.firstRow + SHOWN_ROWS);
  return {
    ...{ file, mapping, splitter, lineEnd, marked, header, places, wide, fieldCount, problems },
    ...(context.sign === null ? {} : { comment: new TextEncoder().encode(context.sign) }),
    firstLine: data[0].line,
    leastFields: Math.max(required, leastFields(data, fieldCount)),
    unitText: mostFrequent(columnTexts(flows, places.unit)),
    orderOpen: options.mapping?.date === undefined && dateTexts.some((text) => /^\d{1,2}[-/.]\d{1,2}[-/.]/.test(text)),
    ...(symbolColumn(header, places.flag) ? { iceLetter: 'b' } : {}),
    repeatsHeader: mapping.layout === 'agency-tab',
    preview: shown.map(({ fields }) => fields),
    previewLines: shown.map(({ line }) => line),
    valueCandidates: roles.candidates.map((column) => ({
      place: { column },
      label: header?.[column] || `column ${column + 1}`,
      samples: data.slice(0, 5).map(({ fields }) => fields[column] ?? ''),
    })),
    others: otherQuantities(roles, { header, data, remarks: above.remarks, mapping, value: places.value }),
    ...{ facts: above.facts, codesAbove: above.codes },
    warnings: warningsOf(options, mapping, wide, header, places.date),
  };
}

function warningsOf(
  options: InspectOptions,
  mapping: Mapping,
  wide: WideColumn[] | null,
  header: readonly string[] | null,
  dates: readonly number[],
): string[] {
  const warnings = wide ? unreadColumns(header ?? [], wide, dates) : [];
  if (options.station && (mapping.station.from === 'column' || wide)) {
    warnings.unshift(`The file names its stations itself; the station “${options.station}” given for it was not used.`);
  }
  return warnings;
}

/** A date with a two-digit year, where most dates have one; null where they do not. */
function shortYearIn(data: readonly SampleRow[], dates: readonly number[]): string | null {
  const texts =
    dates.length === 1
      ? columnTexts(data, dates[0])
      : data.map(({ fields }) => dates.map((column) => fields[column] ?? '').join(' ')).filter((text) => text.trim());
  const short = texts.filter((text) => (dates.length === 1 ? hasShortYear(text) : !/\d{4}/.test(text)));
  return short.length * 2 > texts.length ? short[0] : null;
}

function tableStart(rows: readonly SampleRow[], splitter: LineSplitter, comments: readonly SampleLine[]): TableStart {
  const count = usualCount(rows);
  const start = findTableStart(rows, count);
  const firstLine = rows[start.firstRow]?.line ?? 0;
  const last = comments.findLast(({ line }) => line < firstLine)?.text;
  if (start.header !== null || last === undefined) return start;
  const bytes = new TextEncoder().encode(withoutSign(last));
  const [{ fields }] = splitSample([{ line: 0, text: last, bytes }], splitter);
  return { ...start, header: headerInComment(fields, count) };
}

function refuseWithoutRows(
  file: string,
  rows: SampleRow[],
  { header }: TableStart,
  data: SampleRow[],
  openLine: Uint8Array | null,
): void {
  if (data.length > 0) return;
  // A megabyte that holds a header and no whole row behind it.
  if (openLine !== null && header !== null) throw longLineError(file, rows[rows.length - 1].line + 1, openLine);
  if (header !== null) {
    throw new IntakeError({
      file,
      row: rows[rows.length - 1].line,
      value: header.join(', ').slice(0, 200),
      message: 'the file has a header but no rows of data below it',
      remedy: 'Export it again with the days that it should hold',
    });
  }
  throw new IntakeError({
    file,
    row: rows[0].line,
    value: rows[0].fields.join(' ').slice(0, 200),
    message: 'no dates are found in the file, so its layout is not recognised',
    remedy:
      'Give a table with one row a day: station, date and flow, or date and a column a station; or give a mapping that says where they stand',
    needs: 'mapping',
  });
}

function rolesOf(data: SampleRow[], start: TableStart, fieldCount: number, options: InspectOptions): ColumnRoles {
  const agency = start.header && start.widthRow ? agencyColumns(start.header) : null;
  if (agency) {
    return {
      ...{ date: [agency.date], partsOrder: null, station: agency.station, wide: null, unitColumn: null },
      value: agency.value < 0 ? null : agency.value,
      flag: agency.flag < 0 ? null : agency.flag,
      quantityColumn: null,
      candidates: agency.candidates,
    };
  }
  const known = new Set((options.knownStations ?? []).flatMap(({ code, name }) => [code, name.toLowerCase()]));
  const isKnown = (heading: string) => known.has(heading) || known.has(heading.toLowerCase());
  return assignColumns(columnFacts(data, start.header, fieldCount), start.header, isKnown);
}

function layoutOf(roles: ColumnRoles, start: TableStart, delimiter: string | null): Layout {
  if (roles.wide) return 'wide';
  if (start.widthRow) return 'agency-tab';
  return delimiter === null ? 'whitespace' : 'long';
}

/** The fewest fields that a fair share of rows have: some files leave an empty flag off. The last row may be cut. */
function leastFields(data: readonly SampleRow[], fieldCount: number): number {
  const rows = data.slice(0, -1);
  const shares = new Map<number, number>();
  for (const { fields } of rows) shares.set(fields.length, (shares.get(fields.length) ?? 0) + 1 / rows.length);
  return Math.min(fieldCount, ...[...shares].filter(([, share]) => share >= 0.05).map(([count]) => count));
}

function symbolColumn(header: readonly string[] | null, flag: number): boolean {
  return flag >= 0 && /^sym(bol)?$/i.test(header?.[flag]?.trim() ?? '');
}

/** True when rows have a date and a flow and nearly all have the fields that they should. */
export function isSettled(plan: TablePlan, body: readonly SampleLine[]): boolean {
  if (plan.mapping.value === null && plan.wide === null) return false;
  const data = splitSample(body, plan.splitter).filter(({ line }) => line >= plan.firstLine);
  const fitting = data.filter(({ fields }) => {
    const right = fields.length >= plan.leastFields && fields.length <= plan.fieldCount;
    return right && (plan.places.date.length === 3 || looksLikeDate(fields[plan.places.date[0]] ?? ''));
  });
  return fitting.length >= data.length * 0.9;
}
