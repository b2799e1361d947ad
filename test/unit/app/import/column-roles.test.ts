import { describe, expect, test } from 'vitest';
import { placesOf, type Role, rolesOf, withRole } from '@/app/components/import/column-roles';
import type { Mapping } from '@/lib/intake/types';

const mapping = (change: Partial<Mapping>): Mapping => ({
  layout: 'long',
  station: { from: 'column', column: 0 },
  date: { columns: [1], order: 'dmy' },
  value: { column: 2 },
  flag: { column: 'Q' },
  unit: 'm3/s',
  missing: [],
  decimal: '.',
  ...change,
});
const HEADER = ['site', 'when', 'flow', 'Q', 'remark'];

describe('rolesOf', () => {
  test('says what each column holds, also of columns called by name', () => {
    expect(rolesOf(mapping({}), HEADER, 5)).toEqual(['station', 'date', 'value', 'flag', 'none']);
  });
  test.each([
    ['ymd', ['year', 'month', 'day']],
    ['dmy', ['day', 'month', 'year']],
    ['mdy', ['month', 'day', 'year']],
  ] as const)('takes the parts of a date in the order %s', (order, parts) => {
    const date = { columns: [0, 1, 2], order };
    expect(rolesOf(mapping({ station: { from: 'file-name' }, date, value: null, flag: null }), null, 3)).toEqual(parts);
  });
  test('of calendar layouts the columns of year and month, or of year and day of the month', () => {
    const date = { columns: [0, 1], order: 'ymd' as const };
    const at = (layout: Mapping['layout']) =>
      rolesOf(mapping({ layout, station: { from: 'file-name' }, date, flag: null }), null, 4);
    expect(at('month-rows')).toEqual(['year', 'month', 'value', 'none']);
    expect(at('day-rows')).toEqual(['year', 'day', 'value', 'none']);
  });
});

describe('withRole', () => {
  const roles: Role[] = ['station', 'date', 'value', 'none'];
  test('takes a role from the column that had it', () => {
    expect(withRole(roles, 3, 'value')).toEqual(['station', 'date', 'none', 'value']);
    expect(withRole(roles, 0, 'none')).toEqual(['none', 'date', 'value', 'none']);
  });
  test('lets a whole date and its parts shut one another out', () => {
    expect(withRole(roles, 3, 'year')).toEqual(['station', 'none', 'value', 'year']);
    expect(withRole(['year', 'month', 'day', 'none'], 3, 'date')).toEqual(['none', 'none', 'none', 'date']);
  });
});

describe('placesOf', () => {
  test('is the inverse of rolesOf', () => {
    const roles: Role[] = ['value', 'none', 'date', 'station', 'flag'];
    const { places } = placesOf(roles, mapping({}));
    expect(places).toMatchObject({ layout: 'long', date: { columns: [2], order: 'dmy' } });
    expect(rolesOf({ ...mapping({}), ...places }, HEADER, 5)).toEqual(roles);
  });
  test('puts year, month and day in this order', () => {
    const { places } = placesOf(['day', 'month', 'year', 'value'], mapping({}));
    expect(places?.date).toEqual({ columns: [2, 1, 0], order: 'ymd' });
  });
  test('says what is missing, and makes no mapping of it', () => {
    expect(placesOf(['station', 'year', 'value'], mapping({})).missing).toMatch(/year, month and day/);
    expect(placesOf(['station', 'date', 'none'], mapping({})).missing).toMatch(/values/);
    expect(placesOf(['none', 'year', 'value'], mapping({ layout: 'month-rows' })).missing).toMatch(/month/);
  });
  test('leaves a station to the file’s name when no column holds it any more', () => {
    expect(placesOf(['none', 'date', 'value'], mapping({})).places?.station).toEqual({ from: 'file-name' });
  });
  test('of a wide file says where the date stands, and nothing of its stations', () => {
    expect(placesOf(['date', 'none', 'none'], mapping({ layout: 'wide' })).places).toEqual({
      layout: 'wide',
      date: { columns: [0], order: 'dmy' },
    });
  });
});
