/** What each column of a table holds, as a mapping says it and as a person changes it. */
import type { FieldPlace, Mapping } from '@/lib/intake/types';

export const ROLES = ['none', 'station', 'date', 'year', 'month', 'day', 'value', 'flag'] as const;
export type Role = (typeof ROLES)[number];

const ROLE_WORDS: Record<Role, string> = {
  none: 'left out',
  station: 'station',
  date: 'date',
  year: 'year',
  month: 'month',
  day: 'day',
  value: 'value',
  flag: 'flag',
};

const PARTS = { y: 'year', m: 'month', d: 'day' } as const;

/** Roles that a layout knows: in a wide file every column is a station's but for those of the date. */
export function rolesFor(layout: Mapping['layout']): readonly Role[] {
  switch (layout) {
    case 'wide':
      return ['none', 'date', 'year', 'month', 'day'];
    case 'month-rows':
      return ['none', 'station', 'date', 'year', 'month', 'value', 'flag'];
    case 'day-rows':
      return ['none', 'station', 'year', 'day', 'value', 'flag'];
    default:
      return ROLES;
  }
}

/** A role in words; in calendar layouts the first day's (or month's) column stands for those that follow it. */
export function roleWords(role: Role, layout: Mapping['layout']): string {
  if (layout === 'month-rows') {
    const words: Partial<Record<Role, string>> = {
      ...{ none: 'as it follows', date: 'year and month', value: 'day 1', flag: 'flag of day 1' },
    };
    return words[role] ?? ROLE_WORDS[role];
  }
  if (layout === 'day-rows') {
    const words: Partial<Record<Role, string>> = { none: 'as it follows', value: 'January', flag: 'flag of January' };
    return words[role] ?? ROLE_WORDS[role];
  }
  return layout === 'wide' && role === 'none' ? 'a station' : ROLE_WORDS[role];
}

/** The role of each of `count` columns under a mapping.
 *  @param header  names of the columns, by which a mapping may call them */
export function rolesOf(mapping: Mapping, header: readonly string[] | null, count: number): Role[] {
  const roles: Role[] = new Array(count).fill('none');
  const give = (column: number | string | [number, number], role: Role) => {
    const at = typeof column === 'string' ? (header ?? []).indexOf(column) : column;
    if (typeof at === 'number' && at >= 0 && at < count) roles[at] = role;
  };
  const { station, date, value, flag } = mapping;
  if (station.from === 'column') give(station.column, 'station');
  if (flag && 'column' in flag) give(flag.column, 'flag');
  if (value && 'column' in value) give(value.column, 'value');
  const parts = partsOf(mapping);
  for (const [at, column] of date.columns.entries()) give(column, parts[at]);
  return roles;
}

/** What the columns of a mapping's date hold, in their order. */
function partsOf({ layout, date }: Mapping): Role[] {
  const single = date.columns.length === 1;
  if (layout === 'month-rows') return single ? [date.year === undefined ? 'date' : 'month'] : ['year', 'month'];
  if (layout === 'day-rows') return single ? ['day'] : ['year', 'day'];
  return single ? ['date'] : [...date.order].map((letter) => PARTS[letter as keyof typeof PARTS]);
}

/** The roles after one column got another. A role is one column's alone; a whole date and its parts shut one another out. */
export function withRole(roles: readonly Role[], column: number, role: Role): Role[] {
  const parts: Role[] = ['year', 'month', 'day'];
  const goes = (other: Role) =>
    other === role || (role === 'date' && parts.includes(other)) || (parts.includes(role) && other === 'date');
  return roles.map((other, at) => {
    if (at === column) return role;
    return role !== 'none' && goes(other) ? 'none' : other;
  });
}

/** The places that roles come to, laid over what the mapping says already.
 *  @returns `missing`: why the file cannot be read by these roles, in plain words */
export function placesOf(
  roles: readonly Role[],
  mapping: Mapping,
): { places: Partial<Mapping>; missing: null } | { places: null; missing: string } {
  const at = (role: Role) => roles.indexOf(role);
  const date = dateOf(roles, mapping);
  if (date === null) return { places: null, missing: DATE_MISSING[mapping.layout] ?? DATE_MISSING.long };
  if (mapping.layout === 'wide') return { places: { layout: 'wide', date }, missing: null };
  if (at('value') < 0) return { places: null, missing: 'One column has to hold the values.' };
  const place = (role: Role): FieldPlace | null => (at(role) < 0 ? null : { column: at(role) });
  const station: Mapping['station'] =
    at('station') >= 0
      ? { from: 'column', column: at('station') }
      : mapping.station.from === 'column'
        ? { from: 'file-name' }
        : mapping.station;
  const { layout } = mapping;
  return { places: { layout, station, date, value: place('value'), flag: place('flag') }, missing: null };
}

const DATE_MISSING: Partial<Record<Mapping['layout'], string>> & { long: string } = {
  long: 'A date stands in one column, or in three: give each of year, month and day one.',
  'month-rows': 'One column has to hold the month, beside that of the year.',
  'day-rows': 'One column has to hold the day of the month.',
};

function dateOf(roles: readonly Role[], { layout, date }: Mapping): Mapping['date'] | null {
  const whole = roles.indexOf('date');
  if (whole >= 0) return { ...date, columns: [whole] };
  const [year, month, day] = (['year', 'month', 'day'] as const).map((role) => roles.indexOf(role));
  if (layout === 'month-rows' || layout === 'day-rows') {
    const part = layout === 'month-rows' ? month : day;
    if (part < 0 || (year < 0 && date.year === undefined)) return null;
    if (year < 0) return { ...date, columns: [part] };
    const { year: _headings, ...rest } = date;
    return { ...rest, columns: [year, part] };
  }
  return [year, month, day].includes(-1) ? null : { ...date, columns: [year, month, day], order: 'ymd' };
}
