import { expect, test } from 'vitest';
import { applyStaging } from '../../../lib/store/apply-staging.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { listImports, undoImport } from '../../../lib/store/imports.ts';
import { getLayer, listLayers } from '../../../lib/store/layers.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { createStaging, discardStaging } from '../../../lib/store/staging.ts';
import { getStation, listStations, upsertRegistry } from '../../../lib/store/stations.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const NaN_ = Number.NaN;

const idOf = async (regionId: number, fileName: string): Promise<number> => {
  const found = (await listImports(regionId)).find((row) => row.fileName === fileName);
  return found!.id;
};

const count = (table: string): number => {
  const connection = openConnection(place.path);
  const [number] = rows(connection, `SELECT COUNT(*) FROM "${table}"`).get([]) as [number];
  connection.close();
  return number;
};

test('undoing the only import of a region leaves no station, record, part or mark', async () => {
  const { regionId, imports } = await importFiles([
    [
      { code: 'A', values: [1, 2] },
      { code: 'B', values: [3] },
    ],
  ]);
  const [{ id }] = await listStations(regionId);
  await addMark({ stationId: id, firstDay: 0, lastDay: 0, kind: 'reject', reason: 'ice' });
  expect(await undoImport(imports[0].id)).toEqual({ regionId, records: 2, stationsRemoved: 2 });
  for (const table of ['Station', 'Record', 'Part', 'Laid', 'Import', 'Mark']) expect(count(table), table).toBe(0);
});

test('undoing the first of two imports leaves the record of the second, and its station', async () => {
  const first = await importFiles([[{ code: 'A', values: [1, 2, 3] }]]);
  const second = await importFiles([[{ code: 'A', firstDay: 2, values: [3, 4], codes: ['e', 'e'] }]]);
  await undoImport(first.imports[0].id);
  expect((await seenRecords(first.regionId)).A).toMatchObject({ firstDay: 2, values: [3, 4], flags: [1, 1] });
  expect(count('Laid')).toBe(0);
  await undoImport(second.imports[0].id);
  expect(await listStations(first.regionId)).toEqual([]);
});

test('undoing a revision brings the old values back; undoing what it revised keeps the revision', async () => {
  const first = await importFiles([[{ code: 'A', values: [1, 2, 3] }]]);
  const before = await seenRecords(first.regionId);
  const revision = await importFiles([[{ code: 'A', values: [1, 20, 3] }]], { revise: true });
  await undoImport(revision.imports[0].id);
  expect(await seenRecords(first.regionId)).toEqual(before);
  await importFiles([[{ code: 'A', values: [1, 20, 3] }]], { revise: true });
  await undoImport(first.imports[0].id);
  expect((await seenRecords(first.regionId)).A.values).toEqual([1, 20, 3]);
});

test('undoing one of three imports lays the other two anew, in the unit of the first that remains', async () => {
  const first = await importFiles([[{ code: 'A', values: [1000, 2000], unit: 'L/s' }]]);
  await importFiles([[{ code: 'A', firstDay: 2, values: [3] }]]);
  await importFiles([[{ code: 'A', firstDay: 3, values: [4] }]]);
  await undoImport(first.imports[0].id);
  expect((await seenRecords(first.regionId)).A).toMatchObject({ firstDay: 2, values: [3, 4] });
  expect(count('Laid')).toBe(1);
});

test('undoing a registry puts the facts back, and removes the stations that it made and nobody else needs', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const before = await getStation(regionId, 'A');
  await upsertRegistry(
    regionId,
    [
      { code: 'A', name: 'Alder Bridge', areaKm2: 12 },
      { code: 'B', name: 'Beck' },
      { code: 'C', name: 'Combe' },
    ],
    { fileName: 'stations.csv' },
  );
  await importFiles([[{ code: 'C', values: [1] }]]);
  const undone = await undoImport(await idOf(regionId, 'stations.csv'));
  expect(undone.stationsRemoved).toBe(1);
  expect(await getStation(regionId, 'A')).toEqual(before);
  expect((await listStations(regionId)).map(({ code, name }) => [code, name])).toEqual([
    ['A', 'A'],
    ['C', 'C'],
  ]);
});

test('undoing an earlier registry leaves what a later one said again, and the later one’s undo goes all the way back', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const before = await getStation(regionId, 'A');
  await upsertRegistry(regionId, [{ code: 'A', name: 'First', areaKm2: 10, river: 'Wethe' }], { fileName: '1.csv' });
  await upsertRegistry(regionId, [{ code: 'A', name: 'Second', areaKm2: 10 }], { fileName: '2.csv' });
  await undoImport(await idOf(regionId, '1.csv'));
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'Second', areaKm2: 10, river: '' });
  await undoImport(await idOf(regionId, '2.csv'));
  expect(await getStation(regionId, 'A')).toEqual(before);
});

const CHANGES = [
  { date: '1990-05-01', kind: 'dam', note: 'Upper dam' },
  { date: '1971-10-01', kind: 'gauge moved', note: '' },
] as const;

test('a registry’s changes, named flows and notes are stored in one spelling, and go with its undo', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const before = await getStation(regionId, 'A');
  const flow = { name: 'Minimum', kind: 'legal minimum', value: 0.3, unit: 'm3/s', months: [9, 8] } as const;
  const entry = {
    code: 'A',
    changes: CHANGES,
    namedFlows: [{ ...flow, months: [...flow.months] }],
    notes: 'By the mill',
  };
  await upsertRegistry(regionId, [entry], { fileName: '1.csv' });
  const set = await getStation(regionId, 'A');
  expect(set).toMatchObject({ changes: [CHANGES[1], CHANGES[0]], notes: 'By the mill' });
  expect(set?.namedFlows).toEqual([{ ...flow, months: [8, 9] }]);
  const again = await upsertRegistry(regionId, [{ ...entry, changes: [...CHANGES].reverse() }], { fileName: '2.csv' });
  expect(again.imports[0].stationsChanged).toBe(0);
  await undoImport(await idOf(regionId, '2.csv'));
  expect(await getStation(regionId, 'A')).toEqual(set);
  await undoImport(await idOf(regionId, '1.csv'));
  expect(await getStation(regionId, 'A')).toEqual(before);
});

test('facts found in a file of flows fill what is empty, never replace, and a later offer steps in at their undo', async () => {
  const found = (name: string, areaKm2: number) => [[{ code: 'A', name, areaKm2, latitude: 47, longitude: 8 }]];
  const one = await importFiles([[{ code: 'A', values: [1] }]], {}, found('Alder', 10));
  const { regionId } = one;
  const two = await importFiles([[{ code: 'A', values: [1] }]], {}, found('Alder Bridge', 11));
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'Alder', areaKm2: 10, latitude: 47, longitude: 8 });
  await upsertRegistry(regionId, [{ code: 'A', name: 'At Alder' }], { fileName: 'stations.csv' });
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'At Alder', areaKm2: 10 });
  await undoImport(one.imports[0].id);
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'At Alder', areaKm2: 11 });
  await undoImport(await idOf(regionId, 'stations.csv'));
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'Alder Bridge', areaKm2: 11 });
  await importFiles([[{ code: 'A', values: [1] }]]);
  await undoImport(two.imports[0].id);
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'A', areaKm2: null, latitude: null });
});

test('undoing a registry lays depths anew with the area that stood before', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  await upsertRegistry(regionId, [{ code: 'A', areaKm2: 86.4 }], { fileName: '1.csv' });
  await importFiles([[{ code: 'A', firstDay: 1, values: [2], unit: 'mm/d' }]]);
  await upsertRegistry(regionId, [{ code: 'A', areaKm2: 864 }], { fileName: '2.csv' });
  expect((await seenRecords(regionId)).A.values).toEqual([1, 20]);
  await undoImport(await idOf(regionId, '2.csv'));
  expect((await seenRecords(regionId)).A.values).toEqual([1, 2]);
  const before = dump(place.path);
  await expect(undoImport(await idOf(regionId, '1.csv'))).rejects.toMatchObject({ problem: { needs: 'area' } });
  expect(dump(place.path).filter((row) => !row.startsWith('Import'))).toEqual(
    before.filter((row) => !row.startsWith('Import')),
  );
  expect((await listImports(regionId)).every(({ undoing }) => !undoing)).toBe(true);
});

test('undoing layers puts the layer of that name back that stood before', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const give = async (fileName: string, geojson: string) => {
    const staging = createStaging(`layer-${fileName}`);
    const file = staging.addFile({ kind: 'layer', fileName });
    staging.stageLayer(file, { name: 'rivers', kind: 'river', geojson });
    staging.seal();
    const { imports } = await applyStaging(staging.jobId, { region: { id: regionId } });
    discardStaging(staging.jobId);
    return imports[0].id;
  };
  const shown = async () => {
    const [layer] = await listLayers(regionId);
    return layer && getLayer(regionId, layer.id);
  };
  const first = await give('first', '"one"');
  const second = await give('second', '"two"');
  const third = await give('third', '"three"');
  await undoImport(second);
  expect(await shown()).toBe('"three"');
  await undoImport(third);
  expect(await shown()).toBe('"one"');
  await undoImport(first);
  expect(await shown()).toBeUndefined();
});

test('undoImport() refuses an import that is not there, or is undone already', async () => {
  const { imports } = await importFiles([[{ code: 'A', values: [1, NaN_] }]]);
  await undoImport(imports[0].id);
  await expect(undoImport(imports[0].id)).rejects.toMatchObject({ code: 'not-found' });
  await expect(undoImport(999)).rejects.toMatchObject({ code: 'not-found' });
});
