import { expect, test } from 'vitest';
import { DEFAULT_BASIS } from '../../../lib/basis.ts';
import { regionInputs } from '../../../lib/jobs/region-inputs.ts';
import { sharedWaterOf } from '../../../lib/jobs/shared-water.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { seeded } from '../../seeded.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();

const DAYS = 7 * 365;
const random = seeded(21);

/** Flows that go up and down by the week about a season. */
function flows(): number[] {
  let state = 0;
  return Array.from({ length: DAYS }, (_, day) => {
    if (day % 7 === 0) state = 0.7 * state + random() - 0.5;
    return Math.exp(2 + Math.cos((2 * Math.PI * day) / 365.25) + state);
  });
}

test('sharedWaterOf finds stations whose flows go together once the season is out, and counts valued days', async () => {
  const above = flows();
  const twin = above.map((value, day) => (day % 100 === 0 ? Number.NaN : 3 * value * Math.exp(0.02 * random())));
  const late = above.slice(DAYS - 250 * 7);
  const { regionId } = await importFiles([
    [
      { code: 'ABOVE', values: above },
      { code: 'LATE', firstDay: DAYS - 250 * 7, values: late },
      { code: 'OTHER', values: flows() },
      { code: 'TWIN', values: twin },
    ],
  ]);
  const water = await sharedWaterOf(await regionInputs(regionId), DEFAULT_BASIS);
  // LATE is ABOVE itself, but for fewer than 260 weeks; OTHER shares the season alone
  expect(water.correlated.map(({ a, b }) => `${a} ${b}`)).toEqual(['ABOVE TWIN']);
  expect(water.correlated[0].correlation).toBeGreaterThan(0.99);
  expect(Object.fromEntries(water.valuedDays)).toEqual({
    ABOVE: DAYS,
    LATE: 250 * 7,
    OTHER: DAYS,
    TWIN: DAYS - Math.ceil(DAYS / 100),
  });

  // a person's rejections count as missing, and are another result
  const station = (await listStations(regionId)).find(({ code }) => code === 'OTHER')!;
  await addMark({ stationId: station.id, quantity: 'flow', firstDay: 0, lastDay: 9, kind: 'reject', reason: 'a boot' });
  const after = await sharedWaterOf(await regionInputs(regionId), DEFAULT_BASIS);
  expect(after.valuedDays.get('OTHER')).toBe(DAYS - 10);
});

test('sharedWaterOf answers a region without records', async () => {
  const { regionId } = await importFiles([[{ code: 'EMPTY', values: [Number.NaN, Number.NaN] }]]);
  const water = await sharedWaterOf(await regionInputs(regionId), DEFAULT_BASIS);
  expect(water.correlated).toEqual([]);
  expect(water.valuedDays.get('EMPTY')).toBe(0);
  expect(await sharedWaterOf([], DEFAULT_BASIS)).toEqual({ valuedDays: new Map(), correlated: [] });
});

test('sharedWaterOf that is cancelled says so and keeps nothing', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: flows() }]]);
  const inputs = await regionInputs(regionId);
  await expect(sharedWaterOf(inputs, DEFAULT_BASIS, { signal: AbortSignal.abort() })).rejects.toThrow('abort');
  expect((await sharedWaterOf(inputs, DEFAULT_BASIS)).valuedDays.get('A')).toBe(DAYS);
});
