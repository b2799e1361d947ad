import * as z from 'zod';
import { FLAG_NAMES } from '../series/daily-series.ts';
import { QUANTITIES, UNITS, UNITS_OF } from '../series/quantities.ts';
import { FIRST_YEAR, LAST_YEAR } from './dates.ts';
import { type FieldPlace, FLOW_UNITS, IntakeError, LAYOUTS, type Mapping } from './types.ts';

const place = z.int().min(0);
const column = z.union([place, z.string().min(1)]);
const slice = z.tuple([place, place]).refine(([start, end]) => start < end, {
  error: 'a slice is [start, end] with the end behind the start',
});
const field = z.union([z.strictObject({ column }), z.strictObject({ slice })]);

const where = z.strictObject({ column, equals: z.string() });

const alsoQuantity = z
  .strictObject({
    quantity: z.enum(QUANTITIES),
    unit: z.enum(UNITS),
    value: field.nullable(),
    flag: field.nullable().optional(),
    where: where.optional(),
  })
  .refine(({ quantity, unit }) => UNITS_OF[quantity].includes(unit));

const mappingSchema = z
  .strictObject({
    layout: z.enum(LAYOUTS),
    station: z.union([
      z.strictObject({ from: z.literal('file-name') }),
      z.strictObject({ from: z.literal('header') }),
      z.strictObject({ from: z.literal('lines-above') }),
      z.strictObject({ from: z.literal('column'), column }),
      z.strictObject({ from: z.literal('given'), code: z.string().min(1) }),
    ]),
    date: z.strictObject({
      columns: z
        .array(z.union([column, slice]))
        .min(1)
        .max(3),
      order: z.enum(['ymd', 'dmy', 'mdy']),
      year: z.union([z.int().min(FIRST_YEAR).max(LAST_YEAR), z.literal('heading')]).optional(),
      yearBegins: z.strictObject({ month: z.int().min(1).max(12), named: z.enum(['first', 'last']) }).optional(),
    }),
    value: field.nullable(),
    flag: field.nullable(),
    unit: z.enum(UNITS).nullable(),
    missing: z.array(z.string()),
    decimal: z.enum(['.', ',']),
    thousands: z.enum([',', '.', ' ', "'"]),
    firstYear: z
      .int()
      .min(FIRST_YEAR)
      .max(LAST_YEAR - 99),
    dailyMean: z.number().min(0).max(1),
    quantity: z.enum(QUANTITIES),
    flags: z.record(z.string().max(200), z.array(z.enum(FLAG_NAMES))),
    also: z.array(alsoQuantity),
    sheet: z.string().min(1),
    delimiter: z.enum([',', ';', '\t']),
    where,
  })
  .partial()
  .superRefine(({ layout, date, quantity = 'flow', unit, also, decimal, thousands }, context) => {
    const refuse = (key: string) => context.addIssue({ code: 'custom', path: [key], message: `${key} does not fit` });
    const calendar = layout === 'month-rows' || layout === 'day-rows';
    // A date stands in one column, or in the three of year, month and day; a calendar's rows have no column of days.
    if (date && date.columns.length === (calendar ? 3 : 2)) refuse('date');
    if (unit && !UNITS_OF[quantity].includes(unit)) refuse('unit');
    if (thousands !== undefined && thousands === decimal) refuse('thousands');
    const quantities = [quantity, ...(also ?? []).map((other) => other.quantity)];
    if (new Set(quantities).size < quantities.length) refuse('also');
  });

/** What each key takes, in words for messages. */
const TAKES: Record<string, string> = {
  layout: LAYOUTS.join(', '),
  station:
    '{"from": "file-name"}, {"from": "lines-above"}, {"from": "header"}, {"from": "column", "column": 0} or {"from": "given", "code": "…"}',
  date: '{"columns": [0], "order": "ymd"}, with one column or the three of year, month and day; order ymd, dmy or mdy; with the layouts month-rows and day-rows {"columns": [0, 1], "order": "ymd"}, year and month (day), or {"columns": [0], "order": "ymd", "year": 1987} or "year": "heading", and where years do not begin in January "yearBegins": {"month": 10, "named": "last"}',
  value: '{"column": 2}, {"column": "flow"} or {"slice": [28, 38]}, positions from 0, ends exclusive',
  flag: 'null, {"column": 3}, {"column": "flag"} or {"slice": [38, 40]}',
  unit: `${FLOW_UNITS.join(', ')}; with a quantity beside flow, a unit of that quantity`,
  missing: 'a list of texts',
  decimal: '"." or ","',
  thousands: `",", ".", " " or "'", and not the decimal sign`,
  firstYear: `the year that two-digit years begin with, ${FIRST_YEAR} to ${LAST_YEAR - 99}: with 1930, "29" is 2029`,
  dailyMean: "the share of a day, 0 to 1, that its values must cover for their mean to be the day's, such as 0.8",
  quantity: QUANTITIES.map((quantity) => `${quantity} (in ${UNITS_OF[quantity].join(', ')})`).join('; '),
  flags: `what flags mean, by their text: {"B": ["ice"], "7": []}, any of ${FLAG_NAMES.join(', ')}`,
  also: '[{"quantity": "stage", "unit": "m", "value": {"column": "level"}}], each quantity once and in a unit of its own',
  sheet: 'the name of a sheet of the workbook',
  delimiter: '",", ";" or a tab',
  where: '{"column": "PARAM", "equals": "1"}',
};

/** Checks a mapping given as JSON; any subset of keys will do.
 *  @param file  name of the mapping's file (or of the flow file), for messages
 *  @throws IntakeError naming the first key that is unknown or has a bad value */
export function parseMapping(input: unknown, file: string): Partial<Mapping> {
  const result = mappingSchema.safeParse(input);
  if (result.success) return result.data;
  const issue = result.error.issues[0];
  const key = String(
    issue.code === 'unrecognized_keys' && issue.path.length === 0 ? issue.keys[0] : (issue.path[0] ?? ''),
  );
  const value = typeof input === 'object' && input !== null ? (input as Record<string, unknown>)[key] : input;
  throw new IntakeError({
    file,
    value: JSON.stringify(value)?.slice(0, 200),
    message:
      key === ''
        ? 'a mapping must be a JSON object'
        : Object.hasOwn(TAKES, key)
          ? `the mapping's “${key}” cannot be read`
          : `a mapping has no key “${key}”`,
    remedy: Object.hasOwn(TAKES, key)
      ? `It takes ${TAKES[key]}`
      : `Give any of ${Object.keys(TAKES).join(', ')}, for example {"unit": "m3/s"}`,
    needs: 'mapping',
  });
}

/** Position of a column given by position or by header name.
 *  @throws IntakeError when the header has no such name */
export function columnPosition(wanted: number | string, header: readonly string[] | null, file: string): number {
  if (typeof wanted === 'number') return wanted;
  const exact = header?.indexOf(wanted) ?? -1;
  if (exact >= 0) return exact;
  const alike = header?.findIndex((name) => name.trim().toLowerCase() === wanted.trim().toLowerCase()) ?? -1;
  if (alike >= 0) return alike;
  throw new IntakeError({
    file,
    value: wanted,
    message: 'the mapping names a column that the file does not have',
    remedy: header
      ? `Its columns are ${header.map((name) => `“${name}”`).join(', ')}`
      : 'The file has no header row: name columns by position, from 0',
    needs: 'mapping',
  });
}

/** The characters of a field in a fixed-width file; null for a column. */
export function sliceOf(place: FieldPlace): [number, number] | null {
  return 'slice' in place ? place.slice : null;
}
