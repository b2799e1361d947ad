import type { InspectOptions, Layout, Mapping, Quantity, StatedFacts, Unit } from '../types.ts';
import type { ColumnRoles } from './assign-columns.ts';
import { findUnit } from './find-unit.ts';
import { type LinesAbove, stationAbove } from './lines-above.ts';
import { type NumberSigns, numberSigns } from './number-signs.ts';
import { otherQuantityIn } from './other-quantities.ts';
import type { SampleRow } from './sample.ts';

/** What was recognised, with what a person gave laid over it. */
export function mappingOf(
  roles: ColumnRoles,
  data: readonly SampleRow[],
  found: {
    header: string[] | null;
    delimiter: string | null;
    above: LinesAbove;
    options: InspectOptions;
    layout: Layout;
  },
): Mapping {
  const { header, delimiter, above, options } = found;
  const column = (at: number | null) => (at === null ? null : { column: at });
  const where = roles.quantityColumn === null ? null : quantityFilter(roles.quantityColumn, data, above.remarks);
  return {
    layout: found.layout,
    station: stationOf(roles, options, above.facts),
    date: { columns: roles.date, order: roles.partsOrder ?? 'ymd' },
    value: roles.wide ? null : column(roles.value),
    flag: roles.wide ? null : column(roles.flag),
    missing: [],
    decimal: '.',
    ...(delimiter === null ? {} : { delimiter }),
    ...(where ? { where } : {}),
    ...options.mapping,
    unit:
      options.unit ??
      options.mapping?.unit ??
      unitIn(options.mapping?.quantity ?? 'flow', {
        headings: valueHeadings(roles, header, options.mapping?.value),
        unitText: mostFrequent(columnTexts(data, roles.unitColumn ?? -1)),
        ...above,
      }),
  };
}

/** The headings of the columns that are read: of the one that a person chose, where one did. */
function valueHeadings(
  roles: ColumnRoles,
  header: readonly string[] | null,
  chosen: Mapping['value'] | undefined,
): string[] {
  const headingOf = (column: number | string) => (typeof column === 'string' ? column : (header?.[column] ?? ''));
  if (roles.wide) return roles.wide.map(({ value }) => headingOf(value));
  if (chosen) return 'column' in chosen ? [headingOf(chosen.column)] : [];
  return roles.value === null ? [] : [headingOf(roles.value)];
}

/** The unit that a file states for a quantity. That of another than flow stands in its heading, or is asked for. */
function unitIn(quantity: Quantity, found: Parameters<typeof findUnit>[0]): Unit | null {
  if (quantity === 'flow') return findUnit(found);
  const named = found.headings.map(otherQuantityIn);
  return named.length === 1 && named[0].quantity === quantity ? named[0].unit : null;
}

/** The station of a table that has no column for it. */
export function stationOf(
  roles: Pick<ColumnRoles, 'wide' | 'station'>,
  options: InspectOptions,
  facts: readonly StatedFacts[],
): Mapping['station'] {
  if (roles.wide) return { from: 'header' };
  if (roles.station !== null) return { from: 'column', column: roles.station };
  if (options.station) return { from: 'given', code: options.station };
  return { from: stationAbove(facts, options.knownStations) === null ? 'file-name' : 'lines-above' };
}

/** The decimal and thousands signs of the values, as given or as they show.
 *  @returns `open`: a value whose sign may be either, which must be asked; null when all is clear */
export function signsOf(
  texts: readonly string[],
  given: Partial<Mapping> | undefined,
): { signs: NumberSigns; open: string | null } {
  if (given?.thousands !== undefined) {
    const { thousands } = given;
    const decimal = given.decimal ?? (thousands === '.' ? ',' : thousands === ',' ? '.' : numberSigns(texts)?.decimal);
    return { signs: { decimal: decimal ?? '.', thousands }, open: null };
  }
  const shown = numberSigns(texts);
  const open = shown === null ? (texts.find((text) => /^[+-]?\d{1,3}[.,]\d{3}$/.test(text)) ?? null) : null;
  if (given?.decimal === undefined) return { signs: shown ?? { decimal: '.' }, open };
  const { decimal } = given;
  // With the decimal sign said, the other one can only stand between thousands.
  const other = decimal === '.' ? ',' : '.';
  const grouped = shown === null ? open?.includes(other) : shown.decimal === decimal && shown.thousands !== undefined;
  return { signs: { decimal, ...(grouped ? { thousands: shown?.thousands ?? other } : {}) }, open: null };
}

/** Files that hold several quantities number them in a column; a title line says which number is discharge. */
export function quantityFilter(
  column: number,
  data: readonly SampleRow[],
  remarks: readonly string[],
): NonNullable<Mapping['where']> | null {
  const titled = remarks
    .map((text) => /(?:discharge|flow)[^=]*\(\s*\w+\s*=\s*(\w+)\s*\)/i.exec(text)?.[1])
    .find(Boolean);
  if (titled) return { column, equals: titled };
  const texts = new Set(data.map(({ fields }) => fields[column] ?? ''));
  if (texts.size === 1) return { column, equals: [...texts][0] };
  // Texts that name their quantities: the only one that is the flow.
  const flows = [...texts].filter((text) => FLOW_WORDS.test(text));
  return flows.length === 1 ? { column, equals: flows[0] } : null;
}

const FLOW_WORDS =
  /(?<!\p{L})(?:flow|streamflow|discharge|runoff|abfluss|durchfluss|d[ée]bit|caudal|vaz[ãa]o|vattenf[öo]ring|afvoer|portata|q)(?!\p{L})/iu;

/** The filled fields of a column. */
export function columnTexts(data: readonly SampleRow[], column: number): string[] {
  return column < 0 ? [] : data.map(({ fields }) => fields[column] ?? '').filter((text) => text !== '');
}

/** The text that occurs most often; empty when there is none. */
export function mostFrequent(texts: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const text of texts) counts.set(text, (counts.get(text) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '';
}
