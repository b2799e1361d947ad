import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Unit } from '../../../lib/series/quantities.ts';
import type { DerivedRecipe } from '../../../lib/series/station-history.ts';
import { undoImport } from '../../../lib/store/imports.ts';
import { OVERLAP_RULES } from '../../../lib/store/lay-parts.ts';
import { regionDataHash } from '../../../lib/store/records.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { addStation } from '../../../lib/store/station-edit.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importFiles, type PartInput, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

const CODES = [null, '', 'A', 'P', 'e'];
/** Of each quantity, units between which its values convert. */
const UNITS = { flow: ['m3/s', 'L/s', 'ft3/s'], stage: ['m', 'cm', 'ft'], rainfall: ['mm', 'in'] } as const;
const MEASURED = Object.keys(UNITS) as (keyof typeof UNITS)[];

const day = fc.record({
  value: fc.oneof(fc.constant(Number.NaN), fc.constantFrom(0, 0.1, 1, 2.5)),
  code: fc.constantFrom(...CODES),
});
const partOfStation = (code: string, quantity: keyof typeof UNITS): fc.Arbitrary<PartInput> =>
  fc
    .record({
      firstDay: fc.integer({ min: -3, max: 6 }),
      days: fc.array(day, { minLength: 1, maxLength: 6 }),
      unit: fc.constantFrom<Unit>(...UNITS[quantity]),
    })
    .map(({ firstDay, days, unit }) => ({
      ...{ code, quantity, firstDay, unit },
      // A day without a row has no value.
      values: days.map(({ value, code: text }) => (text === null ? Number.NaN : value)),
      codes: days.map(({ code: text }) => text),
    }));
const found = fc.record({
  code: fc.constantFrom('A', 'B', 'C'),
  name: fc.option(fc.constantFrom('Alder', 'Beck'), { nil: undefined }),
  areaKm2: fc.option(fc.constantFrom(10, 20), { nil: undefined }),
});
/** A file: parts for some of three stations, of some quantities, with its rule and the facts it states. */
const file = fc.record({
  parts: fc
    .tuple(
      ...['A', 'B', 'C'].flatMap((code) =>
        MEASURED.map((quantity) =>
          fc.option(partOfStation(code, quantity), { nil: null, freq: quantity === 'flow' ? 3 : 1 }),
        ),
      ),
    )
    .map((parts) => parts.filter((part) => part !== null)),
  rule: fc.constantFrom(...OVERLAP_RULES),
  facts: fc.uniqueArray(found, { maxLength: 3, selector: ({ code }) => code }),
});
type File = typeof file extends fc.Arbitrary<infer F> ? F : never;

const takeIn = ({ parts, rule, facts }: File, id: number) =>
  importFiles([parts], { rule, region: { id }, unknownStations: 'make' }, [facts]);

/** All that readers see of a region but its ids. */
async function seenOf(regionId: number) {
  const stations = (await listStations(regionId)).map(({ id: _id, ...facts }) => facts);
  const records = await Promise.all(MEASURED.map((quantity) => seenRecords(regionId, quantity)));
  return { stations, records };
}

/** What is there beforehand. */
const BEFORE: PartInput[] = ['A', 'B'].map((code) => ({ code, firstDay: 2, values: [4], codes: ['P'] }));

/** Twice A, and B of the day before taken away. */
const RECIPE: DerivedRecipe = {
  quantity: 'flow',
  terms: [
    { code: 'A', factor: 2, lagDays: 0 },
    { code: 'B', factor: -1, lagDays: 1 },
  ],
  note: '',
};

test('under any rules, import then undo is the identity on records, facts and what is derived, and undoing any one of several is as if it had not been', async () => {
  let round = 0;
  await fc.assert(
    fc.asyncProperty(fc.array(file, { minLength: 1, maxLength: 4 }), fc.nat(), async (files, pick) => {
      const undone = pick % files.length;
      const withAll = await createRegion({ name: `All ${round}` });
      const without = await createRegion({ name: `Without ${round++}` });
      for (const { id } of [withAll, without]) {
        await importFiles([BEFORE], { region: { id } });
        await addStation(id, { code: 'D', derived: RECIPE });
      }
      const ids: number[] = [];
      for (const one of files) {
        const before = await seenOf(withAll.id);
        const dry = await importFiles([one.parts], {
          ...{ rule: one.rule, region: { id: withAll.id }, unknownStations: 'make', dryRun: true },
        });
        const once = await takeIn(one, withAll.id);
        expect(once.imports[0].revisions).toEqual(dry.imports[0].revisions);
        await undoImport(once.imports[0].id);
        expect(await seenOf(withAll.id)).toEqual(before);
        ids.push((await takeIn(one, withAll.id)).imports[0].id);
      }
      await undoImport(ids[undone]);
      for (const one of files.filter((_, index) => index !== undone)) await takeIn(one, without.id);
      expect(await seenOf(withAll.id)).toEqual(await seenOf(without.id));
      expect(regionDataHash(withAll.id)).toBe(regionDataHash(without.id));
    }),
    { numRuns: 25, seed: 20261201 },
  );
}, 180_000);
