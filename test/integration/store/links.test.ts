import { expect, test } from 'vitest';
import { openConnection } from '../../../lib/store/connection.ts';
import { listLinks, removeLink, setLink, setLinks } from '../../../lib/store/links.ts';
import { deleteRegion } from '../../../lib/store/regions.ts';
import { listMappings, removeMapping, saveMapping } from '../../../lib/store/saved-mappings.ts';
import { dump, importFiles } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const stations = (codes: string[]) => importFiles([codes.map((code) => ({ code, values: [1] }))]);

test('setLink() keeps a link once, and a later word only changes its source', async () => {
  const { regionId } = await stations(['A', 'B']);
  const made = await setLink(regionId, { upstream: 'A', downstream: 'B', source: 'river-layer' });
  const again = await setLink(regionId, { upstream: 'A', downstream: 'B', source: 'person' });
  expect(again.id).toBe(made.id);
  expect(await listLinks(regionId)).toEqual([{ id: made.id, upstream: 'A', downstream: 'B', source: 'person' }]);
  expect(await removeLink(regionId, made.id)).toBe(true);
  expect(await removeLink(regionId, made.id)).toBe(false);
});

test('setLink() refuses a station below itself, a circle by its way, an unknown code and an unknown source', async () => {
  const { regionId } = await stations(['A', 'B', 'C', 'D']);
  for (const [upstream, downstream] of ['AB', 'BC', 'AD'].map((pair) => pair.split(''))) {
    await setLink(regionId, { upstream, downstream, source: 'person' });
  }
  const before = dump(place.path);
  const link = (upstream: string, downstream: string, source = 'person') =>
    setLink(regionId, { upstream, downstream, source: source as 'person' });
  await expect(link('A', 'A')).rejects.toMatchObject({ code: 'bad-input' });
  await expect(link('C', 'A')).rejects.toThrow('C → A → B → C');
  await expect(link('A', 'Z')).rejects.toMatchObject({ code: 'not-found', message: expect.stringContaining('"Z"') });
  await expect(link('D', 'C', 'hearsay')).rejects.toMatchObject({ code: 'bad-input' });
  expect(dump(place.path)).toEqual(before);
});

test('setLinks() makes all links or none, and sees a circle that they make among themselves', async () => {
  const { regionId } = await stations(['A', 'B', 'C']);
  const links = (pairs: string[]) =>
    pairs.map(([upstream, downstream]) => ({ upstream, downstream, source: 'river-layer' as const }));
  const before = dump(place.path);
  await expect(setLinks(regionId, links(['AB', 'BC', 'CA']))).rejects.toThrow('A → B → C → A');
  await expect(setLinks(regionId, links(['AB', 'BZ']))).rejects.toMatchObject({ code: 'not-found' });
  expect(dump(place.path)).toEqual(before);
  expect(await setLinks(regionId, links(['BC', 'AB']))).toMatchObject(links(['BC', 'AB']));
  expect(await listLinks(regionId)).toMatchObject(links(['AB', 'BC']));
});

test('saveMapping() replaces the one of that name, and deleteRegion() leaves no link, finding or mapping behind', async () => {
  const { regionId, slug } = await stations(['A', 'B']);
  const unlinked = await saveMapping(regionId, { name: ' Monthly ', mapping: { layout: 'long', unit: 'L/s' } });
  await saveMapping(regionId, { name: 'Monthly', mapping: { layout: 'month-rows' } });
  expect(await listMappings(regionId)).toMatchObject([
    { id: unlinked.id, name: 'Monthly', mapping: { layout: 'month-rows' } },
  ]);
  await expect(saveMapping(regionId, { name: ' ', mapping: {} })).rejects.toMatchObject({ code: 'bad-input' });
  expect(await removeMapping(regionId, unlinked.id + 1)).toBe(false);
  await setLink(regionId, { upstream: 'A', downstream: 'B', source: 'person' });
  const connection = openConnection(place.path);
  connection.exec(
    "INSERT INTO Finding (stationId, kind, firstDay, lastDay, days) SELECT id, 'jump', 0, 0, 1 FROM Station",
  );
  connection.close();
  await deleteRegion(slug);
  const left = dump(place.path).filter((row) => !/^(sqlite_sequence|_prisma_migrations)/.test(row));
  expect(left).toEqual([]);
});
