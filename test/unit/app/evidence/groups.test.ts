import { expect, test } from 'vitest';
import { noInfluenceKnown, shownGroups } from '@/app/regions/[region]/evidence/shown-groups';
import { toldGroups } from '@/app/regions/[region]/evidence/told-groups';
import type { BeyondChance, GroupAnswer } from '@/lib/region/regional-types';

const found = (count: number, bound: number): BeyondChance => ({ count, bound, expected: bound / 2, p: 0.5 });
const group = (id: string, set: GroupAnswer['set'], ranked: number, falling = found(0, 1)) =>
  ({ id, set, ranked, falling, rising: found(0, 1) }) as GroupAnswer;
const names = (groups: readonly GroupAnswer[]) => groups.map(({ id, set }) => `${id} ${set}`);

test('shownGroups: an independent set stands by itself only where it leaves somebody out and keeps somebody', () => {
  const groups = [
    group('all', 'all', 30),
    group('all', 'independent', 20),
    group('influence:urban', 'all', 2),
    group('influence:urban', 'independent', 2),
    group('influence:unknown', 'all', 1),
    group('influence:unknown', 'independent', 0),
  ];
  expect(names(shownGroups(groups))).toEqual([
    'all all',
    'all independent',
    'influence:urban all',
    'influence:unknown all',
  ]);
});

test('shownGroups: one class that holds all stations says nothing of its own, an area that holds them does', () => {
  const groups = [group('all', 'all', 15), group('all', 'independent', 14), group('drawn', 'all', 15)];
  const unknown = [group('influence:unknown', 'all', 15), group('influence:unknown', 'independent', 14)];
  expect(names(shownGroups([...groups, ...unknown]))).toEqual(['all all', 'all independent', 'drawn all']);
});

test('noInfluenceKnown: only where every ranked station is of unknown influence', () => {
  const unknown = group('influence:unknown', 'all', 15);
  expect(noInfluenceKnown([group('all', 'all', 15), unknown])).toBe(true);
  expect(noInfluenceKnown([group('all', 'all', 16), unknown])).toBe(false);
  expect(noInfluenceKnown([group('all', 'all', 15), group('influence:natural', 'all', 15)])).toBe(false);
  expect(noInfluenceKnown([group('all', 'all', 0)])).toBe(false);
});

test('toldGroups: what was drawn, all stations, and the natural ones where they are fewer', () => {
  const all = group('all', 'all', 30);
  const natural = group('influence:natural', 'all', 17);
  expect(names(toldGroups([all, natural, group('drawn', 'all', 5)]))).toEqual([
    'drawn all',
    'all all',
    'influence:natural all',
  ]);
  expect(names(toldGroups([all, { ...natural, ranked: 30 }]))).toEqual(['all all']);
  expect(toldGroups([])).toEqual([]);
});

test('toldGroups: the independent stations speak where they come to another verdict', () => {
  const beyond = found(12, 10);
  expect(names(toldGroups([group('all', 'all', 30, beyond), group('all', 'independent', 9, found(4, 4))]))).toEqual([
    'all all',
    'all independent',
  ]);
  expect(names(toldGroups([group('all', 'all', 30, beyond), group('all', 'independent', 9, found(5, 4))]))).toEqual([
    'all all',
  ]);
});
