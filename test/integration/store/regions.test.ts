import { expect, test } from 'vitest';
import { DEFAULT_BASIS, parseBasis } from '../../../lib/basis.ts';
import { deleteBasis, listBases, saveBasis } from '../../../lib/store/bases.ts';
import { deleteLayer, getLayer, listLayers, putLayer } from '../../../lib/store/layers.ts';
import {
  createRegion,
  deleteRegion,
  getRegion,
  listRegions,
  renameRegion,
  setRegionBasis,
  setRegionTiles,
} from '../../../lib/store/regions.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { dump, importFiles } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();

test('createRegion() gives a region exactly the default basis, and refuses a name that reads alike', async () => {
  const region = await createRegion({ name: ' Upper Wethe ', invented: true });
  expect(region).toMatchObject({ slug: 'upper-wethe', name: 'Upper Wethe', invented: true, tileUrl: null });
  expect(region.basis).toEqual(DEFAULT_BASIS);
  expect(await getRegion('upper-wethe')).toEqual(region);
  await expect(createRegion({ name: 'upper—wethe' })).rejects.toMatchObject({ code: 'exists' });
  await expect(createRegion({ name: '  ' })).rejects.toMatchObject({ code: 'bad-input' });
  expect(await listRegions()).toMatchObject([
    { stations: 0, records: 0, firstYear: null, lastYear: null, lastImport: null },
  ]);
});

test('a region keeps its basis, its name and its map background', async () => {
  await createRegion({ name: 'Wethe' });
  const basis = parseBasis({ days: 30, exclude: [], period: [1985, 2024] });
  expect((await setRegionBasis('wethe', basis)).basis).toEqual(basis);
  expect((await renameRegion('wethe', 'Lauch')).slug).toBe('lauch');
  expect(await getRegion('wethe')).toBeNull();
  const tiles = { url: 'https://tiles.example/{z}/{x}/{y}.png', attribution: '© Example' };
  expect(await setRegionTiles('lauch', tiles)).toMatchObject({
    tileUrl: tiles.url,
    tileAttribution: tiles.attribution,
    basis,
  });
  expect(await setRegionTiles('lauch', null)).toMatchObject({ tileUrl: null, tileAttribution: null });
  await expect(setRegionTiles('lauch', { url: 'javascript:alert(1)', attribution: '' })).rejects.toMatchObject({
    code: 'bad-input',
  });
  await expect(renameRegion('nowhere', 'X')).rejects.toMatchObject({ code: 'not-found' });
  await createRegion({ name: 'Other' });
  await expect(renameRegion('lauch', 'OTHER')).rejects.toMatchObject({ code: 'exists' });
});

test('layers are listed without their GeoJSON, replaced by name, and not seen from another region', async () => {
  const { id } = await createRegion({ name: 'Wethe' });
  const other = await createRegion({ name: 'Other' });
  const layer = await putLayer(id, { name: 'rivers', kind: 'river', geojson: '{"a":1}' });
  expect(await putLayer(id, { name: 'rivers', kind: 'other', geojson: '{"a":2}' })).toEqual({
    ...layer,
    kind: 'other',
  });
  expect(await listLayers(id)).toEqual([{ id: layer.id, name: 'rivers', kind: 'other' }]);
  expect(await getLayer(id, layer.id)).toBe('{"a":2}');
  expect(await getLayer(other.id, layer.id)).toBeNull();
  expect(await deleteLayer(other.id, layer.id)).toBe(false);
  expect(await deleteLayer(id, layer.id)).toBe(true);
});

test('bases are saved by name', async () => {
  const { id } = await createRegion({ name: 'Wethe' });
  await saveBasis(id, 'summer', parseBasis({ season: [5, 10] }));
  const saved = await saveBasis(id, 'summer', parseBasis({ season: [6, 9] }));
  expect(await listBases(id)).toEqual([{ id: saved.id, name: 'summer', basis: parseBasis({ season: [6, 9] }) }]);
  expect(await deleteBasis(id, saved.id)).toBe(true);
  expect(await listBases(id)).toEqual([]);
});

test('getStation() finds a station by its code as text, leading zeros and all', async () => {
  const { regionId } = await importFiles([[{ code: '007', values: [1] }]]);
  expect(await getStation(regionId, '007')).toMatchObject({ code: '007', name: '007', changes: [], areaKm2: null });
  expect(await getStation(regionId, '7')).toBeNull();
});

test('deleteRegion() takes a region with all that belongs to it, and nothing else', async () => {
  await importFiles([[{ code: 'A', values: [1] }]]);
  const before = dump(place.path).filter((row) => !row.startsWith('sqlite_sequence'));
  const { regionId } = await importFiles([[{ code: 'A', values: [2] }]], { region: { name: 'Second' } });
  await importFiles([[{ code: 'A', firstDay: 1, values: [3] }]], { region: { name: 'Second' } });
  await putLayer(regionId, { name: 'rivers', kind: 'river', geojson: '{}' });
  await saveBasis(regionId, 'mine', DEFAULT_BASIS);
  await deleteRegion('second');
  expect(dump(place.path).filter((row) => !row.startsWith('sqlite_sequence'))).toEqual(before);
  await expect(deleteRegion('second')).rejects.toMatchObject({ code: 'not-found' });
});
