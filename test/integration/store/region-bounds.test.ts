import { expect, test } from 'vitest';
import { applyStaging } from '../../../lib/store/apply-staging.ts';
import { regionBounds } from '../../../lib/store/region-bounds.ts';
import { upsertRegistry } from '../../../lib/store/registry.ts';
import { createStaging } from '../../../lib/store/staging.ts';
import { importFiles } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

test('regionBounds() is null for a region of fewer than three placed stations and no layer, else their box', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  expect(regionBounds(regionId)).toBeNull();
  const places = [
    { code: 'A', latitude: 47, longitude: 8 },
    { code: 'B', latitude: 46.5, longitude: 9 },
  ];
  await upsertRegistry(regionId, places);
  expect(regionBounds(regionId)).toBeNull();
  await upsertRegistry(regionId, [{ code: 'C', latitude: 47.5, longitude: 7.25 }, { code: 'D' }]);
  expect(regionBounds(regionId)).toEqual([7.25, 46.5, 9, 47.5]);
});

test('regionBounds() reaches as far as the layers that were imported', async () => {
  const staging = createStaging('bounds');
  const file = staging.addFile({ kind: 'layer', fileName: 'rivers.geojson' });
  staging.stageLayer(file, { name: 'rivers', kind: 'river', geojson: '{"type":"FeatureCollection","features":[]}' });
  staging.describeFile(file, { sha256: '0', report: { warnings: [], bounds: [7, 46, 10.5, 48] } });
  staging.seal();
  const { regionId } = await applyStaging('bounds', { region: { name: 'Kell' } });
  staging.discard();
  expect(regionBounds(regionId)).toEqual([7, 46, 10.5, 48]);
});
