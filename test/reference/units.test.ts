import { test } from 'vitest';
import { areaFactorOf } from '../../lib/intake/registry/registry-columns.ts';
import { type FlowUnit, toM3s } from '../../lib/series/flow-units.ts';
import { type Quantity, toShownUnit, type Unit } from '../../lib/series/quantities.ts';
import { expectReference, referenceCase } from './reference.ts';

interface Units<U> {
  units: U[];
}

test.each(['flow to m3/s', 'factors printed in reports (4 digits)'])('toM3s gives the %s', (name) => {
  const reference = referenceCase<Units<FlowUnit>, object>('units', name);
  expectReference(reference, { factor: reference.input.units.map((unit) => toM3s(unit, null)) });
});

test('toM3s turns one flow into every unit', () => {
  const reference = referenceCase<Units<FlowUnit> & { value: number; unit: FlowUnit }, object>(
    'units',
    '12.5 ft3/s in every unit',
  );
  const { value, unit, units } = reference.input;
  expectReference(reference, { value: units.map((other) => (value * toM3s(unit, null)) / toM3s(other, null)) });
});

test('toM3s takes a depth a day over an area whose unit a heading names', () => {
  const reference = referenceCase<{ depth_mm: number; area: number; area_heading: string }, object>(
    'units',
    'a depth over 410 square miles',
  );
  const { depth_mm, area, area_heading } = reference.input;
  const areaKm2 = area * (areaFactorOf(area_heading) ?? Number.NaN);
  expectReference(reference, { m3s: depth_mm * toM3s('mm/d', areaKm2) });
});

test('areaFactorOf gives the area to km2', () => {
  const reference = referenceCase<Units<string>, object>('units', 'area to km2');
  expectReference(reference, {
    factor: reference.input.units.map((unit) => areaFactorOf(`area_${unit}`) ?? Number.NaN),
  });
});

test.each([
  ['level to m', ['stage']],
  ['depth to mm', ['rainfall', 'potential-evaporation']],
] as [string, Quantity[]][])('toShownUnit gives the %s', (name, quantities) => {
  const reference = referenceCase<Units<Unit>, object>('units', name);
  for (const quantity of quantities) {
    expectReference(reference, { factor: reference.input.units.map((unit) => toShownUnit(quantity, unit, null)) });
  }
});
