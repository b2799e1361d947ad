import type { Mapping } from '../types.ts';
import { unitNamedIn } from '../units.ts';
import type { ColumnRoles, WideColumn } from './assign-columns.ts';

/** The columns of a wide table; with a mapping's layout "wide", every column that is not the date's. */
export function wideColumns(
  roles: ColumnRoles,
  header: string[] | null,
  mapping: Mapping,
  fieldCount: number,
  position: (column: number | string | [number, number]) => number,
): WideColumn[] {
  const dates = mapping.date.columns.map(position);
  const all = Array.from({ length: fieldCount }, (_, at) => at).filter((at) => !dates.includes(at));
  const columns =
    roles.wide ??
    all.map((value) => ({ name: header?.[value] ?? '', value, flag: null })).filter(({ name }) => name !== '');
  const sharedUnit = columns.length > 0 && columns.every(({ name }) => unitNamedIn(name) !== null);
  return columns.map((column) => ({
    ...column,
    name: (sharedUnit ? column.name.replace(/\s*[([][^)\]]*[)\]]\s*$/, '') : column.name).trim(),
  }));
}

/** Columns of a wide table that are taken for no station must be named: they are left out for every day. */
export function unreadColumns(
  header: readonly string[],
  wide: readonly WideColumn[],
  dates: readonly number[],
): string[] {
  const used = new Set([...dates, ...wide.flatMap(({ value, flag }) => [value, flag ?? value])]);
  const unread = header.filter((name, at) => name !== '' && !used.has(at)).map((name) => `“${name}”`);
  return unread.length === 0 ? [] : [`Columns taken for no station, and not read: ${unread.join(', ')}.`];
}
