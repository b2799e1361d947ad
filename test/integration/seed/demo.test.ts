import { expect, test } from 'vitest';
import { getImportReport, listImports } from '../../../lib/store/imports.ts';
import { getLayer, listLayers } from '../../../lib/store/layers.ts';
import { listLinks } from '../../../lib/store/links.ts';
import { listMarks } from '../../../lib/store/marks.ts';
import { readSeries, stationRecords } from '../../../lib/store/records.ts';
import { createRegion, listRegions } from '../../../lib/store/regions.ts';
import { getStation, listStations } from '../../../lib/store/stations.ts';
import { seedDemo } from '../../../seed/demo.ts';
import { DEMO_SEED, generateRegion } from '../../../seed/generate.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();

test('seedDemo() stores the invented region once, as it was generated', async () => {
  const slug = await seedDemo();
  const [found, ...others] = await listRegions();
  expect(others).toEqual([]);
  expect(found).toMatchObject({ slug, invented: true, stations: 38, records: 38, lastYear: 2025 });

  const generated = generateRegion({ seed: DEMO_SEED, furnished: true });
  const stations = await listStations(found.id);
  const expected = [...generated.stations, ...generated.furnishings.extras].sort((a, b) => (a.code < b.code ? -1 : 1));
  expect(stations).toMatchObject(
    expected.map(({ code, name, river, latitude, longitude, areaKm2, influence }) => ({
      ...{ code, name, river, latitude, longitude, areaKm2, influence },
    })),
  );
  const { code, changes, namedFlows } = generated.stations.find(({ influence }) => influence === 'regulated')!;
  expect(await getStation(found.id, code)).toMatchObject({ changes, namedFlows, derived: null });
  expect(await listLinks(found.id)).toMatchObject(generated.furnishings.links);

  const [pump, derived] = generated.furnishings.extras;
  expect(await getStation(found.id, derived.code)).toMatchObject({ derived: derived.derived });
  const recordOf = async (wanted: string) =>
    (await stationRecords(found.id)).find((candidate) => candidate.code === wanted)!;
  expect((await recordOf(derived.code)).firstValueDay).toBe((await recordOf(pump.code)).firstDay);

  const [marked] = [...generated.records()].filter(({ marks }) => marks.length > 0);
  const marks = await listMarks((await recordOf(marked.code)).stationId);
  expect(marks).toMatchObject(marked.marks);

  const kinds = (await listLayers(found.id)).map(({ name, kind }) => [name, kind]);
  expect(kinds).toEqual([
    ['Basin', 'other'],
    ['Catchments', 'catchment'],
    ['Rivers', 'river'],
  ]);
  const [basin] = await listLayers(found.id);
  expect(JSON.parse((await getLayer(found.id, basin.id))!)).toEqual(generated.layers()[0].geojson);

  const [record] = generated.records();
  const stored = (await stationRecords(found.id)).find(({ code }) => code === record.code)!;
  readSeries([stored.stationId], (_, series) => {
    expect(series.firstDay).toBe(record.firstDay);
    expect(Buffer.compare(bytesOf(series.values), bytesOf(record.values))).toBe(0);
  });

  const flows = (await listImports(found.id)).find(({ kind }) => kind === 'flows')!;
  expect(flows.rejected).toBe(0);
  expect((await getImportReport(found.id, flows.id))!.report).toMatchObject({
    warnings: ['Made by a generator: no flow in this region was ever measured.'],
  });

  expect(await seedDemo()).toBeNull();
  expect(await listRegions()).toHaveLength(1);
});

test('seedDemo() leaves a database alone that has a region, even an empty one', async () => {
  await createRegion({ name: 'Mine' });
  expect(await seedDemo()).toBeNull();
  expect((await listRegions()).map(({ name }) => name)).toEqual(['Mine']);
});

const bytesOf = (values: Float64Array) => Buffer.from(values.buffer, values.byteOffset, values.byteLength);
