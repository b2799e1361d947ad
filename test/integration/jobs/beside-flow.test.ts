import { expect, test } from 'vitest';
import { besideFlow } from '../../../lib/jobs/beside-flow.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();

test('besideFlow answers a stage in metres over the flow of the same days, rejected days left out', async () => {
  const { regionId } = await importFiles([
    [{ code: 'A', firstDay: 1, values: [5, 6, 7] }],
    [{ code: 'A', firstDay: 0, values: [30, 40, Number.NaN, 990, 50], quantity: 'stage', unit: 'cm' }],
  ]);
  const [station] = await listStations(regionId);
  const mark = { firstDay: 3, lastDay: 3, kind: 'reject', reason: 'a boot' } as const;
  await addMark({ stationId: station.id, quantity: 'stage', ...mark });
  const [stage, ...others] = besideFlow(station);
  expect(others).toEqual([]);
  expect(stage).toMatchObject({ quantity: 'stage', unit: 'm', firstDay: 0, lastDay: 4, lowest: 0.3, highest: 0.5 });
  expect(stage.columns.low).toEqual([0.3, 0.4, null, null, 0.5]);
  expect(stage.flow?.high).toEqual([null, 5, 6, 7, null]);
});

test('besideFlow of a station that keeps nothing but flow is empty', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2] }]]);
  expect(besideFlow((await listStations(regionId))[0])).toEqual([]);
});
