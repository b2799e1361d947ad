import { expect, test } from 'vitest';
import type { ApplyOptions } from '../../../lib/store/apply-staging.ts';
import { listImports, undoImport } from '../../../lib/store/imports.ts';
import { OVERLAP_RULES } from '../../../lib/store/lay-parts.ts';
import { OverlapError } from '../../../lib/store/overlap-error.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { listStations, upsertRegistry } from '../../../lib/store/stations.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const gap = Number.NaN;

/** Days 1 to 5 of A: 1 P, none, 3, 4 P, 5. */
const first = () =>
  importFiles([[{ code: 'A', firstDay: 1, values: [1, gap, 3, 4, 5], codes: ['P', '', '', 'P', ''] }]]);
/** Days 0 to 6: one before, unlike and provisional, fills, unlike, equal, none, one after. */
const SECOND = [[{ code: 'A', firstDay: 0, values: [9, 1.5, 2, 33, 4, gap, 6] }]];
const COUNTS = { extended: 2, filled: 1, equal: 1, unlike: 2, unlikeProvisional: 1 };

test.each([
  ['keep', 0, [9, 1, 2, 3, 4, 5, 6]],
  ['take-new', 2, [9, 1.5, 2, 33, 4, 5, 6]],
  ['take-where-provisional', 1, [9, 1.5, 2, 3, 4, 5, 6]],
] as const)('rule %s revises %i of the unlike days and takes in all the others', async (rule, revised, values) => {
  const { regionId } = await first();
  const before = await seenRecords(regionId);
  const applied = await importFiles(SECOND, { rule });
  const revisions = {
    ...{ ...COUNTS, revised },
    stations: [
      {
        ...{ code: 'A', unlike: 2, first: '1970-01-02', last: '1970-01-04' },
        largest: { date: '1970-01-04', standing: 3, other: 33, unit: 'm3/s' },
      },
    ],
  };
  expect(applied.imports[0].revisions).toEqual(revisions);
  expect((await listImports(regionId))[0]).toMatchObject({ rule, revisions });
  expect((await seenRecords(regionId)).A.values).toEqual(values);
  await undoImport(applied.imports[0].id);
  expect(await seenRecords(regionId)).toEqual(before);
});

test('without a rule unlike days refuse every file that has some, each with what it would do', async () => {
  await first();
  const before = dump(place.path);
  const good = [{ code: 'B', values: [1] }];
  const error = await importFiles([...SECOND, good, [{ code: 'A', values: [9, 8] }]]).catch((thrown) => thrown);
  expect(error).toBeInstanceOf(OverlapError);
  const { problem, revisions, others } = error as OverlapError;
  expect([problem.file, problem.needs]).toEqual(['flows-1.csv', 'revise']);
  expect(revisions).toMatchObject({ ...COUNTS, revised: 0 });
  expect(others.map((other) => [other.problem.file, other.revisions.unlike])).toEqual([['flows-3.csv', 1]]);
  expect(dump(place.path)).toEqual(before);
});

test('a first import only extends; a file equal to what stands is taken without a rule', async () => {
  const once = await first();
  const counts = { extended: 4, filled: 0, equal: 0, unlike: 0, unlikeProvisional: 0, revised: 0, stations: [] };
  expect(once.imports[0].revisions).toEqual(counts);
  const again = await first();
  expect(again.imports[0].revisions).toEqual({ ...counts, extended: 0, equal: 4 });
  const registry = await upsertRegistry(once.regionId, [{ code: 'A', name: 'Alder' }]);
  expect(registry.imports[0].revisions).toBeNull();
});

test('the stations with the largest change for their size come first, at most a hundred', async () => {
  const codes = Array.from({ length: 120 }, (_, i) => `S${String(i).padStart(3, '0')}`);
  await importFiles([codes.map((code) => ({ code, values: [100, 100] }))]);
  const changed = codes.map((code, i) => ({ code, values: [100, 100 + i], unit: 'm3/s' as const }));
  const { imports } = await importFiles([changed], { rule: 'take-new' });
  const { unlike, stations } = imports[0].revisions!;
  expect([unlike, stations.length, stations[0].code, stations[99].code]).toEqual([119, 100, 'S119', 'S020']);
});

const DRY: [string, ApplyOptions['rule'] | undefined][] = [
  ['no rule', undefined],
  ...OVERLAP_RULES.map((r) => [r, r] as [string, typeof r]),
];

test.each(DRY)('a dry run with %s tells what the import tells, and leaves no trace', async (_name, rule) => {
  await first();
  const files = [[...(rule ? SECOND[0] : []), { code: 'B', values: [1, 2] }]];
  const before = dump(place.path);
  const tried = await importFiles(files, { rule, dryRun: true });
  expect(dump(place.path)).toEqual(before);
  const { imports, ...more } = await importFiles(files, { rule });
  expect(tried).toEqual({ ...more, imports: imports.map((one) => ({ ...one, id: 0 })) });
});

test('a dry run of a new region makes none, and refuses what the import would refuse', async () => {
  const before = dump(place.path);
  const tried = await importFiles([[{ code: 'A', values: [1] }]], { dryRun: true });
  expect(tried).toMatchObject({ regionId: 0, regionMade: true, stationsMade: 1, records: 1 });
  expect(dump(place.path)).toEqual(before);
  const { id } = await createRegion({ name: 'Wethe' });
  await upsertRegistry(id, [{ code: 'A' }]);
  await importFiles([[{ code: 'A', values: [1] }]]);
  const standing = dump(place.path);
  await expect(importFiles([[{ code: 'C', values: [1] }]], { dryRun: true })).rejects.toThrow('“C”');
  await expect(importFiles([[{ code: 'A', values: [2] }]], { dryRun: true })).rejects.toBeInstanceOf(OverlapError);
  expect(dump(place.path)).toEqual(standing);
});

test('parts of one import are laid over one another by quantity, and a record keeps to its own', async () => {
  const { regionId } = await importFiles([
    [
      { code: 'A', values: [5, 6] },
      { code: 'A', values: [1, 2], unit: 'm', quantity: 'stage' },
      { code: 'A', values: [1], unit: 'in', quantity: 'rainfall' },
    ],
  ]);
  const flows = await seenRecords(regionId);
  // 1 ft = 0.3048 m, 1 in = 25.4 mm
  const { imports } = await importFiles(
    [
      [
        { code: 'A', values: [1 / 0.3048, 10, 10], unit: 'ft', quantity: 'stage' },
        { code: 'A', values: [25.4], unit: 'mm', quantity: 'rainfall' },
      ],
    ],
    { rule: 'keep' },
  );
  expect(imports[0].revisions).toMatchObject({ equal: 2, unlike: 1, extended: 1 });
  expect(imports[0].revisions?.stations[0].largest).toMatchObject({ standing: 2, unit: 'm' });
  expect(await seenRecords(regionId)).toEqual(flows);
  await undoImport(imports[0].id);
  expect(await listStations(regionId)).toHaveLength(1);
});
