import fc from 'fast-check';
import { expect, test } from 'vitest';
import { undoImport } from '../../../lib/store/imports.ts';
import { regionDataHash } from '../../../lib/store/records.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { importFiles, type PartInput, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

const CODES = [null, '', 'A', 'P', 'e'];
const UNITS = ['m3/s', 'L/s', 'ft3/s'] as const;

const day = fc.record({
  value: fc.oneof(fc.constant(Number.NaN), fc.constantFrom(0, 0.1, 1, 2.5)),
  code: fc.constantFrom(...CODES),
});
const partOfStation = (code: string): fc.Arbitrary<PartInput> =>
  fc
    .record({
      firstDay: fc.integer({ min: -3, max: 6 }),
      days: fc.array(day, { minLength: 1, maxLength: 6 }),
      unit: fc.constantFrom(...UNITS),
    })
    .map(({ firstDay, days, unit }) => ({
      ...{ code, firstDay, unit },
      // A day without a row has no value.
      values: days.map(({ value, code: text }) => (text === null ? Number.NaN : value)),
      codes: days.map(({ code: text }) => text),
    }));
/** A file: a part for some of three stations. */
const file = fc
  .tuple(...['A', 'B', 'C'].map((code) => fc.option(partOfStation(code), { nil: null })))
  .map((parts) => parts.filter((part) => part !== null));

test('import then undo is the identity on records, and undoing any one of several is as if it had not been', async () => {
  let round = 0;
  await fc.assert(
    fc.asyncProperty(fc.array(file, { minLength: 1, maxLength: 4 }), fc.nat(), async (files, pick) => {
      const undone = pick % files.length;
      const withAll = await createRegion({ name: `All ${round}` });
      const without = await createRegion({ name: `Without ${round++}` });
      const options = { revise: true, unknownStations: 'make' as const };
      const ids: number[] = [];
      for (const parts of files) {
        const before = regionDataHash(withAll.id);
        const once = await importFiles([parts], { ...options, region: { id: withAll.id } });
        await undoImport(once.imports[0].id);
        expect(regionDataHash(withAll.id)).toBe(before);
        ids.push((await importFiles([parts], { ...options, region: { id: withAll.id } })).imports[0].id);
      }
      await undoImport(ids[undone]);
      for (const parts of files.filter((_, index) => index !== undone)) {
        await importFiles([parts], { ...options, region: { id: without.id } });
      }
      expect(await seenRecords(withAll.id)).toEqual(await seenRecords(without.id));
      expect(regionDataHash(withAll.id)).toBe(regionDataHash(without.id));
    }),
    { numRuns: 25, seed: 20261201 },
  );
}, 180_000);
