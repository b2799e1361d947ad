import { expect, test } from 'vitest';
import type { DerivedRecipe } from '../../../lib/series/station-history.ts';
import { undoImport } from '../../../lib/store/imports.ts';
import { addMark, removeMark } from '../../../lib/store/marks.ts';
import { readSeries } from '../../../lib/store/records.ts';
import { addStation, editStation, removeStation } from '../../../lib/store/station-edit.ts';
import { stationQuantities } from '../../../lib/store/station-quantities.ts';
import { getStation, upsertRegistry } from '../../../lib/store/stations.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const gap = Number.NaN;

const recipe = (...terms: [string, number, number?][]): DerivedRecipe => ({
  quantity: 'flow',
  terms: terms.map(([code, factor, lagDays = 0]) => ({ code, factor, lagDays })),
  note: '',
});
const valuesOf = async (regionId: number) =>
  Object.fromEntries(Object.entries(await seenRecords(regionId)).map(([code, { values }]) => [code, values]));

/** A and B measured, S = A + B, H = half of S a day before. */
async function region(): Promise<{ regionId: number; importId: number }> {
  const { regionId, imports } = await importFiles([
    [
      { code: 'A', values: [1, 2, 3], codes: ['P', '', ''] },
      { code: 'B', values: [1000, gap, 3000], unit: 'L/s' },
    ],
  ]);
  await addStation(regionId, { code: 'H', derived: null });
  await addStation(regionId, { code: 'S', derived: recipe(['A', 1], ['B', 1]) });
  await editStation(regionId, 'H', { derived: recipe(['S', 0.5, 1]) });
  return { regionId, importId: imports[0].id };
}

test('a derived record is the sum of its terms in m³/s, with their flags, and so is one derived from it', async () => {
  const { regionId } = await region();
  const seen = await seenRecords(regionId);
  expect(seen.S).toMatchObject({ firstDay: 0, values: [2, gap, 6], flags: [2, 0, 0] });
  expect(seen.H).toMatchObject({ firstDay: 1, values: [1, gap, 3], flags: [2, 0, 0] });
  const { id, derived } = (await getStation(regionId, 'H'))!;
  expect(derived).toEqual(recipe(['S', 0.5, 1]));
  expect(stationQuantities(id)).toEqual([
    { quantity: 'flow', unit: 'm3/s', valueCount: 2, firstValueDay: 1, lastValueDay: 3 },
  ]);
});

test('derived records follow an import, its undo, a mark, and the recipe, and end with their terms', async () => {
  const { regionId, importId } = await region();
  const before = await seenRecords(regionId);
  const revision = await importFiles([[{ code: 'A', values: [11] }]], { rule: 'take-new' });
  expect(await valuesOf(regionId)).toMatchObject({ S: [12, gap, 6], H: [6, gap, 3] });
  await undoImport(revision.imports[0].id);
  expect(await seenRecords(regionId)).toEqual(before);

  const { id: stationId } = (await getStation(regionId, 'A'))!;
  const mark = await addMark({ stationId, firstDay: 2, lastDay: 2, kind: 'reject', reason: 'Weed' });
  expect(await valuesOf(regionId)).toMatchObject({ S: [2], H: [1] });
  await removeMark(mark.id);
  expect(await seenRecords(regionId)).toEqual(before);

  await editStation(regionId, 'S', { derived: recipe(['A', 1], ['B', -1]) });
  expect(await valuesOf(regionId)).toMatchObject({ S: [0, gap, 0], H: [0, gap, 0] });
  await editStation(regionId, 'S', { derived: null });
  expect(Object.keys(await seenRecords(regionId))).toEqual(['A', 'B']);
  await editStation(regionId, 'S', { derived: recipe(['A', 1], ['B', 1]) });
  expect(await seenRecords(regionId)).toEqual(before);

  await undoImport(importId);
  expect(await seenRecords(regionId)).toEqual({});
  const leftovers = dump(place.path).filter((row) => /^(Part|Laid|Record) /.test(row));
  expect(leftovers).toEqual([]);
});

test('a derived record follows the drainage area of a term whose flows are depths', async () => {
  const { regionId } = await importFiles([[{ code: 'D', values: [1], unit: 'mm/d' }]]);
  await addStation(regionId, { code: 'S', derived: recipe(['D', 1]) });
  // Without an area a depth is no flow.
  expect((await seenRecords(regionId)).S).toBeUndefined();
  // 1 mm/d over 86.4 km² is 86 400 m³ in 86 400 s
  await editStation(regionId, 'D', { areaKm2: 86.4 });
  expect((await seenRecords(regionId)).S.values).toEqual([1]);
  const registry = await upsertRegistry(regionId, [{ code: 'D', areaKm2: 172.8 }]);
  expect((await seenRecords(regionId)).S.values).toEqual([2]);
  await undoImport(registry.imports[0].id);
  expect((await seenRecords(regionId)).S.values).toEqual([1]);
});

test('a recipe is refused when it leads back to itself, names nobody, or comes to imported days', async () => {
  const { regionId } = await region();
  const before = dump(place.path);
  const set = (code: string, derived: DerivedRecipe) => editStation(regionId, code, { derived });
  await expect(set('S', recipe(['S', 1]))).rejects.toThrow('cannot come from itself');
  await expect(set('S', recipe(['A', 1], ['H', 1]))).rejects.toThrow('S comes from H comes from S');
  await expect(set('S', recipe(['Z', 1]))).rejects.toThrow('no station "Z"');
  await expect(set('A', recipe(['B', 1]))).rejects.toThrow('imported days');
  await expect(set('S', recipe(['A', 0]))).rejects.toThrow('other than 0');
  await expect(set('S', recipe(['A', 1, 0.5]))).rejects.toThrow('0.5');
  await expect(set('S', recipe())).rejects.toThrow('at least one');
  await expect(removeStation(regionId, 'S')).rejects.toMatchObject({ code: 'needed' });
  await expect(importFiles([[{ code: 'S', values: [1] }]], { unknownStations: 'make' })).rejects.toMatchObject({
    problem: { value: 'S', file: 'flows-1.csv' },
  });
  expect(dump(place.path)).toEqual(before);
  await removeStation(regionId, 'H');
  await removeStation(regionId, 'S');
  expect(Object.keys(await seenRecords(regionId))).toEqual(['A', 'B']);
});

test('a registry brings recipes, refuses those that cannot be followed, and takes them away with its undo', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2] }]]);
  const before = dump(place.path);
  await expect(upsertRegistry(regionId, [{ code: 'X', derived: recipe(['Y', 1]) }])).rejects.toMatchObject({
    problem: { value: 'X', message: expect.stringContaining('no station "Y"') },
  });
  const twins = [
    { code: 'X', derived: recipe(['Y', 1]) },
    { code: 'Y', derived: recipe(['X', 1]) },
  ];
  await expect(upsertRegistry(regionId, twins)).rejects.toThrow('X comes from Y comes from X');
  await expect(upsertRegistry(regionId, [{ code: 'A', derived: recipe(['B', 1]) }, { code: 'B' }])).rejects.toThrow(
    'imported days',
  );
  expect(dump(place.path)).toEqual(before);
  const { imports } = await upsertRegistry(regionId, [{ code: 'X', derived: recipe(['A', 2]) }]);
  expect((await seenRecords(regionId)).X.values).toEqual([2, 4]);
  await undoImport(imports[0].id);
  expect(Object.keys(await seenRecords(regionId))).toEqual(['A']);
});

test('stage derives from stage, in metres, and leaves flow alone', async () => {
  const { regionId } = await importFiles([
    [
      { code: 'A', values: [10], unit: 'ft', quantity: 'stage' },
      { code: 'A', values: [5] },
    ],
  ]);
  const derived = { ...recipe(['A', -1]), quantity: 'stage' as const };
  await addStation(regionId, { code: 'S', derived });
  // 10 ft = 3.048 m
  const { id: stationId } = (await getStation(regionId, 'S'))!;
  expect(stationQuantities(stationId)).toMatchObject([{ quantity: 'stage', unit: 'm', valueCount: 1 }]);
  readSeries([stationId], (_id, { values }) => expect(values[0]).toBeCloseTo(-3.048, 12), { quantity: 'stage' });
  expect(Object.keys(await seenRecords(regionId))).toEqual(['A']);
});
