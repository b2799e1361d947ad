import type { DateOrder } from '../dates.ts';
import type { ColumnFacts } from './column-facts.ts';

/** A station's column in a wide table, and the column of its flags when there is one. */
export interface WideColumn {
  name: string;
  value: number;
  flag: number | null;
}

/** Which column holds what. Where the columns do not say it, a place stays null and the candidates are offered. */
export interface ColumnRoles {
  date: number[];
  /** order of the three columns of a date; null for a date in one column */
  partsOrder: DateOrder | null;
  station: number | null;
  value: number | null;
  flag: number | null;
  /** non-null for a wide table */
  wide: WideColumn[] | null;
  unitColumn: number | null;
  quantityColumn: number | null;
  candidates: number[];
}

/** Says which column holds what, by headings first and contents second.
 *  @param isKnown  whether a heading names a station of the region: such a table is wide */
export function assignColumns(
  facts: readonly ColumnFacts[],
  header: readonly string[] | null,
  isKnown: (heading: string) => boolean,
): ColumnRoles {
  const date = dateColumns(facts);
  const roles: ColumnRoles = {
    ...{ date: date.columns, partsOrder: date.order, station: null, value: null, flag: null, wide: null },
    ...{ unitColumn: null, quantityColumn: null, candidates: [] },
  };
  const rest = facts.filter(({ position }) => !date.columns.includes(position));
  if (header === null) assignByContent(roles, rest);
  else assignByHeading(roles, rest, isKnown);
  return roles;
}

function dateColumns(facts: readonly ColumnFacts[]): { columns: number[]; order: DateOrder | null } {
  const byHeading = (role: ColumnFacts['role']) => facts.find((column) => column.role === role)?.position;
  const [year, month, day] = [byHeading('year'), byHeading('month'), byHeading('day')];
  const dated = facts.filter(({ dates }) => dates > 0.5);
  const whole = dated.find(({ role }) => role === 'date') ?? dated[0];
  if (whole) return { columns: [whole.position], order: null };
  if (year !== undefined && month !== undefined && day !== undefined)
    return { columns: [year, month, day], order: 'ymd' };
  for (let at = 0; at + 2 < facts.length; at++) {
    const [first, second, third] = facts.slice(at, at + 3);
    if (second.months < 0.95) continue;
    if (first.years >= 0.95 && third.days >= 0.95) return { columns: [at, at + 1, at + 2], order: 'ymd' };
    if (first.days >= 0.95 && third.years >= 0.95) return { columns: [at, at + 1, at + 2], order: 'dmy' };
  }
  const named = byHeading('date');
  return { columns: named === undefined ? [] : [named], order: null };
}

const isNumeric = (column: ColumnFacts): boolean => column.filled === 0 || column.numbers >= 0.5;

function assignByHeading(roles: ColumnRoles, rest: ColumnFacts[], isKnown: (heading: string) => boolean): void {
  const known = rest.filter(({ heading }) => heading !== '' && isKnown(heading));
  const ofRole = (...wanted: ColumnFacts['role'][]) => rest.filter(({ role }) => wanted.includes(role));
  // A column that is called the flow is it, even where its first rows have gone wrong; among several, contents decide.
  const called = ofRole('value');
  const values = called.length > 1 ? called.filter(isNumeric) : called;
  const stations = ofRole('station');
  roles.unitColumn = ofRole('unit')[0]?.position ?? null;
  roles.quantityColumn = ofRole('quantity')[0]?.position ?? null;

  const unnamed = ofRole('unknown', 'measured').filter((column) => column.heading !== '' && isNumeric(column));
  if (known.length > 0 && (known.length > 1 || values.length === 0)) {
    // A heading that the registry does not know stays among them, for the file to be refused by it.
    makeWide(
      roles,
      rest,
      rest.filter((column) => known.includes(column) || unnamed.includes(column)),
    );
    return;
  }
  const station = (stations.length === 1 ? stations : ofRole('maybe-station').filter(repeats))[0];
  roles.station = station?.position ?? null;
  if (values.length === 1) roles.value = values[0].position;
  else if (values.length === 0 && unnamed.length === 1 && unnamed[0].role === 'measured')
    roles.value = unnamed[0].position;
  else if (values.length === 0 && station === undefined && ofRole('other-quantity').length === 0) {
    const columns = stations.length > 1 ? stations.filter(isNumeric) : unnamed;
    if (columns.length > 0) {
      makeWide(roles, rest, columns);
      return;
    }
  } else if (values.length === 0 && unnamed.length === 1 && ofRole('other-quantity').length === 0) {
    roles.value = unnamed[0].position;
  }
  roles.candidates = candidates(rest, roles);
  roles.flag = roles.value === null ? null : flagOf(rest, roles.value, ofRole('flag'));
}

/** A code column names few stations on many rows; a column of running numbers is none. */
function repeats(column: ColumnFacts): boolean {
  return column.filled < 3 || column.distinct * 2 <= column.filled;
}

/** The flag column of a value: the one right behind it, else the only one there is. */
function flagOf(rest: readonly ColumnFacts[], value: number, flags: readonly ColumnFacts[]): number | null {
  const behind = rest.find(({ position }) => position === value + 1);
  if (behind && (behind.role === 'flag' || (behind.role === 'maybe-station' && behind.filled > 0)))
    return behind.position;
  return flags.length === 1 ? flags[0].position : null;
}

function makeWide(roles: ColumnRoles, rest: readonly ColumnFacts[], columns: readonly ColumnFacts[]): void {
  roles.wide = columns.map(({ heading, position }) => {
    const behind = rest.find((column) => column.position === position + 1);
    return { name: heading, value: position, flag: behind?.role === 'flag' ? behind.position : null };
  });
}

function candidates(rest: readonly ColumnFacts[], roles: ColumnRoles): number[] {
  return rest
    .filter((column) => isNumeric(column) && column.position !== roles.station)
    .filter(({ role }) => role === 'value' || role === 'measured' || role === 'unknown' || role === 'other-quantity')
    .map(({ position }) => position);
}

/** Without a header: what stands before the date names the station, the one number behind it is the flow, and text
 *  behind that its flag. Anything else is asked for. */
function assignByContent(roles: ColumnRoles, rest: ColumnFacts[]): void {
  if (roles.date.length === 0) return;
  const first = Math.min(...roles.date);
  const before = rest.filter(({ position }) => position < first && position >= 0);
  const behind = rest.filter(({ position }) => position > first);
  if (before.length > 0) roles.station = (before.find(repeats) ?? before[0]).position;
  const numeric = behind.filter((column) => column.filled > 0 && column.numbers >= 0.5);
  const text = behind.filter((column) => !numeric.includes(column));
  roles.candidates = numeric.map(({ position }) => position);
  if (numeric.length !== 1) return;
  roles.value = numeric[0].position;
  roles.flag = text.find(({ position }) => position === numeric[0].position + 1)?.position ?? null;
}
