import { expect, test } from 'vitest';
import type { Finding } from '../../../lib/checks/finding.ts';
import { type CheckedRecord, replaceFindings, uncheckedRecords } from '../../../lib/store/checked-records.ts';
import { listFindings, stateOf } from '../../../lib/store/findings.ts';
import { undoImport } from '../../../lib/store/imports.ts';
import { addMark, listRegionMarks, removeMark } from '../../../lib/store/marks.ts';
import { readStored, regionDataHash } from '../../../lib/store/records.ts';
import { addStation, editStation } from '../../../lib/store/station-edit.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

const finding = (firstDay: number, lastDay: number, kind: Finding['kind'] = 'flat'): Finding => ({
  ...{ kind, firstDay, lastDay, days: lastDay - firstDay + 1, detail: { value: 2.5 } },
});

const VALUES = { code: 'A', firstDay: 10, values: [1, 2, 2, 2, 5, 6] };

/** A region of one station, and what the checks may say of it. */
async function region() {
  const { regionId } = await importFiles([[VALUES]]);
  const [{ id: stationId, areaKm2 }] = await listStations(regionId);
  let hash = '';
  readStored([stationId], (_, _series, record) => {
    hash = record.hash;
  });
  const checked = (findings: Finding[], suspect: number[], more: Partial<CheckedRecord> = {}): CheckedRecord => ({
    ...{ stationId, hash, areaKm2, findings, suspect },
    ...more,
  });
  return { regionId, stationId, checked };
}

test('findings stand in the list, and their stretches lie over the record on reading as suspect days, before marks', async () => {
  const { regionId, stationId, checked } = await region();
  const before = await seenRecords(regionId);
  const dataHash = regionDataHash(regionId);
  expect(uncheckedRecords(regionId)).toEqual([stationId]);
  expect(await replaceFindings([checked([finding(11, 13), finding(14, 14, 'step')], [11, 13])])).toBe(1);
  expect(uncheckedRecords(regionId)).toEqual([]);
  expect(listFindings(regionId)).toMatchObject([
    {
      code: 'A',
      quantity: 'flow',
      kind: 'flat',
      firstDay: 11,
      lastDay: 13,
      days: 3,
      detail: { value: 2.5 },
      state: 'open',
    },
    { kind: 'step', firstDay: 14 },
  ]);
  const { A } = await seenRecords(regionId);
  expect(A.flags).toEqual([0, 16, 16, 16, 0, 0]);
  expect(A.values).toEqual(before.A.values);
  expect(A.hash).not.toBe(before.A.hash);
  expect(regionDataHash(regionId)).not.toBe(dataHash);
  const accept = await addMark({ stationId, firstDay: 12, lastDay: 12, kind: 'accept', reason: 'seen at the weir' });
  expect((await seenRecords(regionId)).A.flags).toEqual([0, 16, 0, 16, 0, 0]);
  await removeMark(accept.id);
  expect((await seenRecords(regionId)).A).toEqual(A);
});

test('a second check replaces what the first found; with nothing found the record is as it was', async () => {
  const { regionId, checked } = await region();
  const before = await seenRecords(regionId);
  await replaceFindings([checked([finding(11, 13)], [11, 13])]);
  await replaceFindings([checked([finding(14, 15, 'jump')], [14, 15])]);
  expect(listFindings(regionId)).toMatchObject([{ kind: 'jump' }]);
  await replaceFindings([checked([], [])]);
  expect(listFindings(regionId)).toEqual([]);
  expect(await seenRecords(regionId)).toEqual(before);
});

test('a record that changed since it was checked takes no findings, and forgets those of other days', async () => {
  const { regionId, stationId, checked } = await region();
  expect(await replaceFindings([checked([finding(11, 13)], [11, 13], { hash: 'of other days' })])).toBe(0);
  expect(listFindings(regionId)).toEqual([]);
  await replaceFindings([checked([finding(11, 13)], [11, 13])]);
  const more = await importFiles([[{ code: 'A', firstDay: 16, values: [7] }]], { region: { id: regionId } });
  expect(uncheckedRecords(regionId)).toEqual([stationId]);
  expect(listFindings(regionId)).toEqual([]);
  expect((await seenRecords(regionId)).A.flags).toEqual(new Array(7).fill(0));
  await undoImport(more.imports[0].id);
  expect(uncheckedRecords(regionId)).toEqual([stationId]);
});

test('another drainage area makes a record unchecked; its findings stay meanwhile', async () => {
  const { regionId, stationId, checked } = await region();
  await replaceFindings([checked([finding(11, 13)], [11, 13])]);
  expect(uncheckedRecords(regionId)).toEqual([]);
  await editStation(regionId, 'A', { areaKm2: 12 });
  expect(uncheckedRecords(regionId)).toEqual([stationId]);
  expect(listFindings(regionId)).toHaveLength(1);
});

test('stateOf: the last reject or accept on each day answers, in one mark or in several; a part alone does not; a note only notes', () => {
  const span = { firstDay: 5, lastDay: 9 };
  const mark = (kind: 'reject' | 'accept' | 'note', firstDay = 5, lastDay = 9) => ({ kind, firstDay, lastDay });
  expect(stateOf(span, [])).toBe('open');
  expect(stateOf(span, [mark('note')])).toBe('noted');
  expect(stateOf(span, [mark('reject'), mark('note')])).toBe('rejected');
  expect(stateOf(span, [mark('reject'), mark('accept')])).toBe('accepted');
  expect(stateOf(span, [mark('accept', 0, 20), mark('reject', 6, 9)])).toBe('rejected');
  expect(stateOf(span, [mark('reject', 6, 9), mark('accept', 0, 20)])).toBe('accepted');
  expect(stateOf(span, [mark('reject', 6, 9)])).toBe('open');
  expect(stateOf(span, [mark('reject', 6, 9), mark('reject', 5, 5)])).toBe('rejected');
  expect(stateOf(span, [mark('accept', 8, 12), mark('accept', 1, 7)])).toBe('accepted');
  expect(stateOf(span, [mark('accept', 8, 12), mark('accept', 1, 6)])).toBe('open');
  expect(stateOf(span, [mark('note'), mark('accept', 8, 12)])).toBe('noted');
  expect(stateOf(span, [mark('reject', 0, 4), mark('reject', 10, 12)])).toBe('open');
});

test('listFindings narrows by station, kind and state; listRegionMarks names the stations', async () => {
  const { regionId, stationId, checked } = await region();
  await replaceFindings([checked([finding(11, 13), finding(15, 15, 'negative')], [11, 13, 15, 15])]);
  await addMark({ stationId, firstDay: 15, lastDay: 15, kind: 'reject', reason: 'no tide here', by: 'K. Ohm' });
  expect(listFindings(regionId, { state: 'rejected' })).toMatchObject([{ kind: 'negative' }]);
  expect(listFindings(regionId, { state: 'open' })).toMatchObject([{ kind: 'flat' }]);
  expect(listFindings(regionId, { kind: 'flat', stationId })).toHaveLength(1);
  expect(listFindings(regionId, { stationId: stationId + 1 })).toEqual([]);
  const [mark] = await listRegionMarks(regionId);
  expect(mark).toMatchObject({ code: 'A', kind: 'reject', reason: 'no tide here', by: 'K. Ohm', firstDay: 15 });
  expect(mark.createdAt.getTime()).toBeLessThanOrEqual(Date.now());
  expect(await removeMark(mark.id, stationId + 1)).toBe(false);
  expect(await removeMark(mark.id, stationId)).toBe(true);
});

test('a mark makes the record anew that is derived from the marked one, and its undoing puts it back', async () => {
  const { regionId, stationId } = await region();
  const terms = [{ code: 'A', factor: 2, lagDays: 0 }];
  await addStation(regionId, { code: 'S', derived: { quantity: 'flow', terms, note: '' } });
  const before = await seenRecords(regionId);
  expect(before.S.values).toEqual([2, 4, 4, 4, 10, 12]);
  const mark = await addMark({ stationId, firstDay: 14, lastDay: 15, kind: 'reject', reason: 'ice' });
  const { S } = await seenRecords(regionId);
  expect(S.hash).not.toBe(before.S.hash);
  expect([...S.values.slice(0, 4)]).toEqual([2, 4, 4, 4]);
  expect(S.values.slice(4).filter((value) => !Number.isNaN(value))).toEqual([]);
  await removeMark(mark.id);
  expect((await seenRecords(regionId)).S).toEqual(before.S);
});

test('a mark on a station that is not there is refused', async () => {
  const mark = { stationId: 999, firstDay: 1, lastDay: 1, kind: 'note' as const, reason: 'x' };
  await expect(addMark(mark)).rejects.toMatchObject({ code: 'not-found' });
});
