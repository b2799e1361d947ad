import { expect, test } from 'vitest';
import { NO_ROW } from '../../../lib/series/day-codes.ts';
import { type LayablePart, layParts } from '../../../lib/store/lay-parts.ts';

const CODES = [
  { text: '', bits: 0 },
  { text: 'A', bits: 0 },
  { text: 'P', bits: 2 },
  { text: 'e', bits: 1 },
];
const NaN_ = Number.NaN;

/** A part in m³/s; codes by their text, null where the file has no row. */
function part(firstDay: number, values: number[], codes: (string | null)[] = [], more: Partial<LayablePart> = {}) {
  const index = (text: string | null) => (text === null ? NO_ROW : CODES.findIndex((code) => code.text === text));
  return {
    ...{ unit: 'm3/s' as const, firstDay, rule: 'keep' as const, codeList: CODES },
    values: Float64Array.from(values),
    codes: Uint8Array.from(values, (_, day) => index(codes[day] === undefined ? '' : codes[day])),
    ...more,
  } satisfies LayablePart;
}

const laid = (parts: LayablePart[], areaKm2: number | null = null) => {
  const unlike: unknown[][] = [];
  const { unit, firstDay, values, flags } = layParts(parts, {
    areaKm2,
    watcher: { unlike: (part, { day, standing, other }) => unlike.push([part, day, standing, other]) },
  });
  return { unit, firstDay, values: [...values], flags: [...flags], unlike };
};

test('layParts() spans from the first day of any part to the last, missing between', () => {
  expect(laid([part(5, [1]), part(1, [2, 3])])).toEqual({
    ...{ unit: 'm3/s', firstDay: 1, unlike: [] },
    values: [2, 3, NaN_, NaN_, 1],
    flags: [0, 0, 0, 0, 0],
  });
});

test('layParts() fills missing days from later parts, at start, middle and end', () => {
  const { values, flags } = laid([
    part(0, [NaN_, 2, NaN_, 4, NaN_]),
    part(0, [1, NaN_, 3, NaN_, 5], ['e', '', 'P', '', 'A']),
  ]);
  expect(values).toEqual([1, 2, 3, 4, 5]);
  expect(flags).toEqual([1, 0, 2, 0, 0]);
});

test('layParts() ignores days of which a part has no row, whatever stands in its values', () => {
  expect(laid([part(0, [1, 2]), part(0, [NaN_, 9], ['P', null])])).toMatchObject({ values: [1, 2], unlike: [] });
});

test('keep: an unlike value is reported and left out; an equal one only brings a code where none stands', () => {
  const first = part(0, [1, 2, 3, 4], ['A', '', 'P', '']);
  const { values, flags, unlike } = laid([first, part(0, [9, 2, 3, 4], ['e', 'e', 'A', 'P'])]);
  expect(values).toEqual([1, 2, 3, 4]);
  expect(flags).toEqual([0, 1, 2, 2]);
  expect(unlike).toEqual([[1, 0, 1, 9]]);
});

test('take-new: values and codes are replaced, but not by a missing value or by the lack of a code', () => {
  const first = part(0, [1, 2, 3], ['P', 'P', 'P']);
  const { values, flags, unlike } = laid([first, part(0, [9, 2, NaN_], ['', '', 'A'], { rule: 'take-new' })]);
  expect(values).toEqual([9, 2, 3]);
  expect(flags).toEqual([0, 2, 2]);
  expect(unlike).toEqual([[1, 0, 1, 9]]);
});

test('take-where-provisional: only provisional days give way, to values and to the end of being provisional', () => {
  const first = part(0, [1, 2, 3], ['P', 'A', 'P']);
  const { values, flags } = laid([first, part(0, [9, 9, 3], ['', 'P', ''], { rule: 'take-where-provisional' })]);
  expect(values).toEqual([9, 2, 3]);
  expect(flags).toEqual([0, 0, 0]);
});

test('layParts() reports a conflict with what stands by then, also between later parts', () => {
  const { unlike } = laid([part(0, [1]), part(1, [2]), part(0, [1, 3])]);
  expect(unlike).toEqual([[2, 1, 2, 3]]);
});

test('layParts() converts to the unit of the first part, and takes rounding for equality', () => {
  // 1 ft³/s = 0.028316846592 m³/s by definition of the foot
  const first = part(0, [0.028316846592]);
  const second = part(0, [1, 1000], [], { unit: 'ft3/s' });
  const { values, unlike } = laid([first, second]);
  expect(unlike).toEqual([]);
  expect(values[0]).toBe(0.028316846592);
  expect(values[1]).toBeCloseTo(28.316846592, 9);
  expect(laid([first, part(0, [1.00001], [], { unit: 'ft3/s' })]).unlike).toHaveLength(1);
});

test('layParts() turns depths into flows by the area, and throws without one', () => {
  const depth = part(1, [1], [], { unit: 'mm/d' });
  expect(laid([part(0, [5]), depth], 86.4).values).toEqual([5, 1]);
  expect(() => laid([part(0, [5]), depth], null)).toThrow('layParts: areaKm2');
  expect(laid([depth, part(2, [2], [], { unit: 'mm/d' })], null).values).toEqual([1, 2]);
});

test('layParts() counts what each part comes upon', () => {
  const counts: unknown[] = [];
  const watcher = { laid: (part: number, counted: object) => void counts.push([part, counted]) };
  const first = part(2, [1, NaN_, 3, 4, 5], ['P', '', 'P', 'A', '']);
  const second = part(0, [9, NaN_, 7, 2, 3, 8, 5, 6, NaN_], [], { rule: 'take-where-provisional' });
  layParts([first, second], { areaKm2: null, watcher });
  expect(counts).toEqual([
    [0, { extended: 4, filled: 0, equal: 0, unlike: 0, unlikeProvisional: 0, revised: 0 }],
    // day 2: 1 P → 7, revised · day 3 filled · days 4 and 6 equal · day 5: 4 A stays · days 0 and 7 beyond
    [1, { extended: 2, filled: 1, equal: 2, unlike: 2, unlikeProvisional: 1, revised: 1 }],
  ]);
});

test('layParts() converts other quantities by their own units', () => {
  // 1 ft = 0.3048 m and 1 in = 25.4 mm by definition
  const stage = layParts([part(0, [1], [], { unit: 'm' }), part(1, [10], [], { unit: 'ft' })], {
    ...{ quantity: 'stage', areaKm2: null },
  });
  expect(stage.values[1]).toBeCloseTo(3.048, 12);
  const rain = layParts([part(0, [1], [], { unit: 'in' }), part(1, [50.8], [], { unit: 'mm' })], {
    ...{ quantity: 'rainfall', areaKm2: null },
  });
  expect(rain.values[1]).toBeCloseTo(2, 12);
  const mixed = [part(0, [1]), part(1, [1], [], { unit: 'm' })];
  expect(() => layParts(mixed, { quantity: 'flow', areaKm2: null })).toThrow('unit of flow');
});

test('layParts() leaves its parts as they were, and throws for none', () => {
  const parts = [part(0, [1, NaN_], ['P', '']), part(0, [2, 3], ['A', 'A'], { rule: 'take-new' })];
  const copy = structuredClone(parts);
  laid(parts);
  expect(parts).toEqual(copy);
  expect(() => laid([])).toThrow('layParts: parts');
});
