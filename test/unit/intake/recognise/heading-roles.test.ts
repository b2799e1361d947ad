import { expect, test } from 'vitest';
import { roleOfHeading } from '../../../../lib/intake/recognise/heading-roles.ts';

test.each([
  ['date', 'date'],
  ['Datum', 'date'],
  ['datetime_utc', 'date'],
  ['Year', 'year'],
  ['MM', 'month'],
  ['day', 'day'],
  ['station', 'station'],
  ['siteNo', 'station'],
  ['gauge_id', 'station'],
  ['code', 'maybe-station'],
  ['ID', 'maybe-station'],
  ['flow', 'value'],
  ['flow_cfs', 'value'],
  ['Qdaily', 'value'],
  ['Value', 'value'],
  ['Abfluss [m³/s]', 'value'],
  ['m3/s', 'value'],
  ['Mill (m3/s)', 'measured'],
  ['159456_00060_00003', 'value'],
  ['159456_00060_00003_cd', 'flag'],
  ['agency_cd', 'ignored'],
  ['Flow flag', 'flag'],
  ['quality code', 'flag'],
  ['SYM', 'flag'],
  ['station_name', 'ignored'],
  ['unit', 'unit'],
  ['PARAM', 'quantity'],
  ['rain_mm', 'other-quantity'],
  ['stage', 'other-quantity'],
  ['01013500', 'unknown'],
  ['Ower', 'unknown'],
])('roleOfHeading(“%s”) is %s', (heading, role) => {
  expect(roleOfHeading(heading)).toBe(role);
});
