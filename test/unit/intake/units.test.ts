import { expect, test } from 'vitest';
import type { FlowUnit } from '../../../lib/intake/types.ts';
import { toM3s, unitNamedIn, unitsNamedIn } from '../../../lib/intake/units.ts';

// Exact definitions, NIST SP 811 (2008): foot 0.3048 m, litre 0.001 m³, day 86,400 s.
test.each([
  ['m3/s', 1],
  ['L/s', 0.001],
  ['ft3/s', 0.3048 ** 3],
  ['ML/d', 5 / 432],
  ['Mgal/d', (231e6 * 0.0254 ** 3) / 86400],
  ['acre-ft/d', (43560 * 0.3048 ** 3) / 86400],
] as [FlowUnit, number][])('toM3s(%s) is %d m³/s, whatever the area', (unit, factor) => {
  expect(toM3s(unit, null) / factor).toBeCloseTo(1, 14);
  expect(toM3s(unit, 12)).toBe(toM3s(unit, null));
});

test('toM3s(mm/d) is a depth over the area: 1 mm over 86.4 km² a day is 1 m³/s; NaN without a positive area', () => {
  expect(toM3s('mm/d', 86.4)).toBe(1);
  expect(toM3s('mm/d', null)).toBeNaN();
  expect(toM3s('mm/d', 0)).toBeNaN();
  expect(toM3s('mm/d', -5)).toBeNaN();
});

test('toM3s names a unit that it does not know', () => {
  expect(() => toM3s('gpm' as FlowUnit, null)).toThrow(/toM3s: unit .* gpm/);
});

test.each([
  ['flow_cfs', 'ft3/s'],
  ['Flow (m3/s)', 'm3/s'],
  ['Abfluss [m³/s]', 'm3/s'],
  ['discharge_m3s', 'm3/s'],
  ['Discharge, cubic feet per second (Mean)', 'ft3/s'],
  ['Q [m^3 s^-1]', 'm3/s'],
  ['Q (m³ s⁻¹)', 'm3/s'],
  ['CUMECS', 'm3/s'],
  ['Flow (L/s)', 'L/s'],
  ['flow_l_s', 'L/s'],
  ['litres per second', 'L/s'],
  ['Flow (ML/day)', 'ML/d'],
  ['Flow (ML)', 'ML/d'],
  ['runoff_mm_d', 'mm/d'],
  ['Q mm/day', 'mm/d'],
  ['ft³/s', 'ft3/s'],
  ['flow m3/sec', 'm3/s'],
  ['cubic metres per sec', 'm3/s'],
  ['m3 s-1', 'm3/s'],
  ['cu m/s', 'm3/s'],
  ['L s-1', 'L/s'],
  ['ft^3 per second', 'ft3/s'],
  ['cu. ft./s', 'ft3/s'],
  ['[cft_i]/s', 'ft3/s'],
  ['[ft_i]3/s', 'ft3/s'],
  ['ML d-1', 'ML/d'],
  ['megalitres per day', 'ML/d'],
  ['10^3 m3/day', 'ML/d'],
  ['Flow (MGD)', 'Mgal/d'],
  ['flow_mgal_d', 'Mgal/d'],
  ['million gallons per day', 'Mgal/d'],
  ['Mgal(US)/d', 'Mgal/d'],
  ['10*6.[gal_us]/d', 'Mgal/d'],
  ['acre-feet/day', 'acre-ft/d'],
  ['flow_acre_ft_d', 'acre-ft/d'],
  ['ac-ft per day', 'acre-ft/d'],
  ['AF/day', 'acre-ft/d'],
])('unitNamedIn(“%s”) is %s', (text, unit) => {
  expect(unitNamedIn(text)).toBe(unit);
});

test.each([
  'flow',
  'value',
  'L/s/km²',
  'm3/s/km2',
  'cfsm',
  'mm',
  'stage_m',
  'html',
  'Discharge (m3)',
  'specials',
  'mgd (imperial)',
  'MGD UK',
  'acre-ft',
  'ft/s',
])('unitNamedIn(“%s”) is null: no flow unit', (text) => {
  expect(unitNamedIn(text)).toBeNull();
});

test('unitNamedIn is null where two units are named', () => {
  expect(unitsNamedIn('flow in cfs, converted from m3/s')).toEqual(['m3/s', 'ft3/s']);
  expect(unitNamedIn('flow in cfs, converted from m3/s')).toBeNull();
});
