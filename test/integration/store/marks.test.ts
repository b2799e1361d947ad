import { expect, test } from 'vitest';
import { addMark, addMarks, listMarks, removeMark } from '../../../lib/store/marks.ts';
import { regionDataHash, stationRecords } from '../../../lib/store/records.ts';
import { listStations, upsertRegistry } from '../../../lib/store/stations.ts';
import { importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

test('a rejection lies over the record on reading, is part of its hash, and goes without a trace', async () => {
  const { regionId } = await importFiles([
    [{ code: 'A', firstDay: 10, values: [1, 2, 3, 4], codes: ['e', '', '', ''] }],
  ]);
  const [{ id: stationId }] = await listStations(regionId);
  const before = await seenRecords(regionId);
  const dataHash = regionDataHash(regionId);
  const mark = await addMark({ stationId, firstDay: 5, lastDay: 11, kind: 'reject', reason: 'gauge moved' });
  const { A } = await seenRecords(regionId);
  expect(A).toMatchObject({ values: [1, 2, 3, 4], flags: [33, 32, 0, 0] });
  expect(A.hash).not.toBe(before.A.hash);
  expect((await stationRecords(regionId))[0].hash).toBe(A.hash);
  expect(regionDataHash(regionId)).not.toBe(dataHash);
  await addMark({ stationId, firstDay: 11, lastDay: 99, kind: 'accept', reason: 'looked again' });
  expect((await seenRecords(regionId)).A.flags).toEqual([33, 0, 0, 0]);
  expect(await listMarks(stationId)).toMatchObject([{ kind: 'reject' }, { kind: 'accept' }]);
  for (const { id } of await listMarks(stationId)) expect(await removeMark(id)).toBe(true);
  expect(await removeMark(mark.id)).toBe(false);
  expect(await seenRecords(regionId)).toEqual(before);
  expect(regionDataHash(regionId)).toBe(dataHash);
});

test('a note changes neither days nor hash', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  const [{ id: stationId }] = await listStations(regionId);
  const before = await seenRecords(regionId);
  await addMark({ stationId, firstDay: 0, lastDay: 0, kind: 'note', reason: 'weir cleaned' });
  expect(await seenRecords(regionId)).toEqual(before);
});

test('addMarks() lays one mark on each stretch, or none at all when a stretch is wrong', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2, 3] }]]);
  const [{ id: stationId }] = await listStations(regionId);
  const mark = { stationId, kind: 'reject', reason: 'silt' } as const;
  const [first, third] = [0, 2].map((day) => ({ firstDay: day, lastDay: day }));
  expect(await addMarks({ ...mark, stretches: [third, first] })).toMatchObject([third, first]);
  expect((await seenRecords(regionId)).A.flags.map((bits) => bits & 32)).toEqual([32, 0, 32]);
  const backwards = { firstDay: 1, lastDay: 0 };
  await expect(addMarks({ ...mark, stretches: [first, backwards] })).rejects.toMatchObject({ code: 'bad-input' });
  await expect(addMarks({ ...mark, stretches: [] })).rejects.toMatchObject({ code: 'bad-input' });
  await expect(addMarks({ ...mark, stationId: 99, stretches: [first] })).rejects.toMatchObject({ code: 'not-found' });
  expect(await listMarks(stationId)).toHaveLength(2);
});

test('addMark() refuses days that run backwards, unknown kinds and an empty reason', async () => {
  const mark = { stationId: 1, firstDay: 2, lastDay: 1, kind: 'reject' as const, reason: 'x' };
  await expect(addMark(mark)).rejects.toMatchObject({ code: 'bad-input' });
  await expect(addMark({ ...mark, lastDay: 2.5 })).rejects.toMatchObject({ code: 'bad-input' });
  await expect(addMark({ ...mark, lastDay: 2, kind: 'drop' as 'reject' })).rejects.toMatchObject({ code: 'bad-input' });
  await expect(addMark({ ...mark, lastDay: 2, reason: ' ' })).rejects.toMatchObject({ code: 'bad-input' });
});

test('regionDataHash() changes with any fact of a station, and not with the order of imports', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }], [{ code: 'B', values: [2] }]]);
  const other = await importFiles([[{ code: 'B', values: [2] }], [{ code: 'A', values: [1] }]], {
    region: { name: 'X' },
  });
  expect(regionDataHash(other.regionId)).toBe(regionDataHash(regionId));
  const seen = new Set([regionDataHash(regionId)]);
  const facts = [
    { name: 'n' },
    { river: 'r' },
    { latitude: 1 },
    { longitude: 1 },
    { areaKm2: 1 },
    { influence: 'urban' as const },
  ];
  for (const fact of facts) {
    await upsertRegistry(regionId, [{ code: 'A', ...fact }]);
    seen.add(regionDataHash(regionId));
  }
  expect(seen.size).toBe(7);
});
