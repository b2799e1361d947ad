import { expect, test } from 'vitest';
import type { NamedFlow } from '../../../lib/series/station-history.ts';
import { undoImport } from '../../../lib/store/imports.ts';
import { knownStations } from '../../../lib/store/known-stations.ts';
import { listLinks, setLink } from '../../../lib/store/links.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { addStation, editStation, removeStation, type StationPatch } from '../../../lib/store/station-edit.ts';
import { getStation, listStations, upsertRegistry } from '../../../lib/store/stations.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();

test('editStation() changes what it names and leaves the rest', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  await editStation(regionId, 'A', { name: ' Alder Bridge ', latitude: 47, longitude: 8, influence: 'regulated' });
  const edited = await editStation(regionId, 'A', {
    changes: [{ date: '1990-05-01', kind: 'dam', note: 'Upper dam' }],
    namedFlows: [{ name: 'Stop', kind: 'abstraction stop', value: 120, unit: 'L/s', months: null }],
    notes: 'Ice in January',
  });
  expect(edited).toMatchObject({ name: 'Alder Bridge', latitude: 47, influence: 'regulated', notes: 'Ice in January' });
  expect(edited.changes).toEqual([{ date: '1990-05-01', kind: 'dam', note: 'Upper dam' }]);
  expect(edited.namedFlows[0].value).toBe(120);
  expect(await getStation(regionId, 'A')).toEqual(edited);
});

test('editStation() refuses what cannot be, in words, and changes nothing', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const before = dump(place.path);
  const flow: NamedFlow = { name: 'Stop', kind: 'other', value: 1, unit: 'm3/s', months: null };
  const bad: [StationPatch, string][] = [
    [{ name: ' ' }, 'needs a name'],
    [{ latitude: 91, longitude: 0 }, '91'],
    [{ latitude: 47 }, 'give both'],
    [{ areaKm2: 0 }, 'more than 0 km²'],
    [{ changes: [{ date: '2001-02-29', kind: 'dam', note: '' }] }, '2001-02-29'],
    [{ namedFlows: [flow, flow] }, 'called "Stop"'],
    [{ namedFlows: [{ ...flow, months: [13] }] }, '1 to 12'],
    [{ namedFlows: [{ ...flow, value: -1 }] }, '-1'],
  ];
  for (const [patch, words] of bad) {
    await expect(editStation(regionId, 'A', patch), words).rejects.toMatchObject({
      code: 'bad-input',
      message: expect.stringContaining(words),
    });
  }
  await expect(editStation(regionId, 'Z', { name: 'Zed' })).rejects.toMatchObject({ code: 'not-found' });
  expect(dump(place.path)).toEqual(before);
});

test('editing the area lays a record of depths and flows anew, and refuses to leave it without one', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2], unit: 'mm/d' }]]);
  await editStation(regionId, 'A', { areaKm2: 86.4 });
  await importFiles([[{ code: 'A', firstDay: 2, values: [3] }]]);
  // 1 mm/d over 172.8 km² is 172 800 m³ in 86 400 s
  await editStation(regionId, 'A', { areaKm2: 172.8 });
  expect((await seenRecords(regionId)).A.values).toEqual([2, 4, 3]);
  const before = dump(place.path);
  await expect(editStation(regionId, 'A', { areaKm2: null })).rejects.toMatchObject({
    code: 'bad-input',
    message: expect.stringContaining('drainage area'),
  });
  expect(dump(place.path)).toEqual(before);
});

test('what a person edits outlives the undo of the registry before it, and no edit slips under an import', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const registry = await upsertRegistry(regionId, [{ code: 'A', name: 'Alder', river: 'Wethe' }]);
  await editStation(regionId, 'A', { name: 'Alder Bridge' });
  await undoImport(registry.imports[0].id);
  expect(await getStation(regionId, 'A')).toMatchObject({ name: 'Alder Bridge', river: '' });
  let edit: Promise<unknown> = Promise.resolve();
  await importFiles([Array.from({ length: 3 }, (_, i) => ({ code: `S${i}`, values: [1] }))], {
    unknownStations: 'make',
    sliceMs: 0,
    onProgress: (share) => {
      if (share < 0.5) edit = editStation(regionId, 'A', { notes: 'waits' });
    },
  });
  await edit;
  expect(await getStation(regionId, 'A')).toMatchObject({ notes: 'waits' });
});

test('addStation() makes a station once; removeStation() takes it away with its links, but none with imported days', async () => {
  const { id: regionId } = await createRegion({ name: 'Wethe' });
  await addStation(regionId, { code: 'New', name: 'New weir', areaKm2: 12 });
  await expect(addStation(regionId, { code: 'New' })).rejects.toMatchObject({ code: 'exists' });
  await expect(addStation(regionId, { code: ' ' })).rejects.toMatchObject({ code: 'bad-input' });
  await importFiles([[{ code: 'A', values: [1] }]], { unknownStations: 'make' });
  await setLink(regionId, { upstream: 'New', downstream: 'A', source: 'person' });
  await expect(removeStation(regionId, 'A')).rejects.toMatchObject({
    code: 'needed',
    message: expect.stringContaining('flows-1.csv'),
  });
  await removeStation(regionId, 'New');
  expect((await listStations(regionId)).map(({ code }) => code)).toEqual(['A']);
  expect(await listLinks(regionId)).toEqual([]);
  await expect(removeStation(regionId, 'New')).rejects.toMatchObject({ code: 'not-found' });
});

test('a derived station added by hand makes no registry of a region whose flows make stations', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const derived = { quantity: 'flow' as const, terms: [{ code: 'A', factor: 1, lagDays: 0 }], note: '' };
  await addStation(regionId, { code: 'D', derived });
  expect(knownStations(regionId)).toBeNull();
  await importFiles([[{ code: 'B', values: [1] }]]);
  await addStation(regionId, { code: 'M' });
  expect(knownStations(regionId)?.map(({ code }) => code)).toEqual(['A', 'B', 'D', 'M']);
});
