import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type WrittenSeries, type WrittenStation, watermlDocument } from '../../lib/export/waterml.ts';
import { readFlows } from '../../lib/intake/read-flows.ts';
import type { AlsoQuantity, StagedPart } from '../../lib/intake/types.ts';
import { NO_ROW } from '../../lib/series/day-codes.ts';
import { type Quantity, UNITS_OF } from '../../lib/series/quantities.ts';

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'hungerstone-waterml-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

/** Texts as files write them: anything that XML can hold. */
const text = fc.oneof(
  fc.constantFrom(
    '',
    'A',
    'A:e',
    'P',
    'Ice',
    '<',
    'none',
    'missing',
    '-999.00',
    ' e ',
    '&amp;',
    ']]>',
    'a\r\nb\tc',
    'Brücke 冰 🧊',
  ),
  fc.string({ unit: 'binary', maxLength: 20 }).map((some) => some.replace(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd]/gu, '')),
);
/** All bits but the one that a person sets, and the checks' mark among them. */
const bits = fc.integer({ min: 0, max: 31 });
const code = fc.oneof(
  fc.record({ text, bits }),
  fc.record({ text, bits, valueText: text.filter((some) => some !== '') }),
);
const value = fc.oneof(
  fc.constant(Number.NaN),
  fc.double({ min: 0, max: 1e6, noNaN: true }),
  fc.integer({ min: -1000, max: 100_000 }).map((whole) => whole / 1000 + 0),
  fc.constantFrom(0, 5e-324, 1.7976931348623157e308, 0.1 + 0.2, 1e21, 123456789.12345678),
);

const series = (quantity: Quantity): fc.Arbitrary<WrittenSeries> =>
  fc
    .record({
      unit: fc.constantFrom(...UNITS_OF[quantity]),
      firstDay: fc.integer({ min: -40_000, max: 40_000 }),
      codeList: fc.array(code, { minLength: 1, maxLength: 6 }),
    })
    .chain(({ unit, firstDay, codeList }) =>
      fc
        .array(
          fc.tuple(
            value,
            fc.oneof({ arbitrary: fc.nat(codeList.length - 1), weight: 8 }, { arbitrary: fc.constant(255), weight: 1 }),
          ),
          { minLength: 1, maxLength: 40 },
        )
        .map((days) => ({
          ...{ quantity, unit, firstDay, codeList },
          values: Float64Array.from(days, ([one, number]) => (number === NO_ROW ? Number.NaN : one)),
          codes: Uint8Array.from(days, ([, number]) => number),
        })),
    );

const station: fc.Arbitrary<WrittenStation> = fc.record({
  code: fc.constantFrom('0306', 'A&B <1>', 'Brücke "x"'),
  name: fc.constantFrom('', 'Mill & weir', "Ruisseau de l'Orge"),
  river: fc.constantFrom('', 'Ribble', 'Río <Grande>'),
  latitude: fc.option(fc.double({ min: -90, max: 90, noNaN: true }), { freq: 2 }),
  longitude: fc.double({ min: -180, max: 180, noNaN: true }),
  areaKm2: fc.option(fc.double({ min: 0.001, max: 1e6, noNaN: true }), { freq: 2 }),
});

/** What is comparable of days: by day number, value and code; days without a row do not count. */
function daysOf(part: Pick<StagedPart, 'firstDay' | 'values' | 'codes'> & { codeList: WrittenSeries['codeList'] }) {
  return [...part.codes].flatMap((number, at) => {
    if (number === NO_ROW) return [];
    const { text: flag, bits: flags, valueText } = part.codeList[number];
    return [[part.firstDay + at, part.values[at] + 0, flag || (valueText ?? ''), flags, valueText ?? null]];
  });
}

// The writer's numbers are the shortest that read back (ECMA-262, Number::toString), so the identity holds bit for bit.
test('watermlDocument, then readFlows, gives values, missing days, flags, units and facts back', async () => {
  const also: AlsoQuantity[] = [{ quantity: 'stage', unit: 'm', value: null }];
  let number = 0;
  await fc.assert(
    fc.asyncProperty(station, series('flow'), fc.option(series('stage')), async (about, flow, stage) => {
      const all = [flow, ...(stage ? [stage] : [])];
      const path = join(folder, `${number++}.xml`);
      writeFileSync(path, [...watermlDocument([{ station: about, series: all }], new Date(0))].join(''));
      const parts: StagedPart[] = [];
      const mapping = stage ? { also: [{ ...also[0], unit: stage.unit }] } : {};
      const hasFlow = flow.codes.some((one) => one !== 255);
      const reading = readFlows(path, { fileName: 'x.xml', mapping, emit: (part) => parts.push(part) });
      if (!hasFlow) {
        await expect(reading).rejects.toThrow(/no series|holds no/);
        return;
      }
      const { facts, rejectedTotal } = await reading;
      expect(rejectedTotal).toBe(0);
      const written = all.filter(({ codes }) => codes.some((one) => one !== 255));
      expect(parts.map((part) => [part.code, part.quantity ?? 'flow', part.unit])).toEqual(
        written.map(({ quantity, unit }) => [about.code, quantity, unit]),
      );
      for (const [at, part] of parts.entries()) expect(daysOf(part)).toEqual(daysOf(written[at]));
      const { code: _, ...found } = facts?.[0] ?? { code: '' };
      expect(found).toEqual({
        ...(about.name === '' ? {} : { name: about.name }),
        ...(about.river === '' ? {} : { river: about.river }),
        ...(about.latitude === null ? {} : { latitude: about.latitude + 0, longitude: (about.longitude ?? 0) + 0 }),
        ...(about.areaKm2 === null ? {} : { areaKm2: about.areaKm2 }),
      });
    }),
    { numRuns: 150 },
  );
});
