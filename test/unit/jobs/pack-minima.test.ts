import { deserialize, serialize } from 'node:v8';
import { expect, test } from 'vitest';
import { joinPacked, packMinima, unpackMinima } from '../../../lib/jobs/pack-minima.ts';
import { sampleMinima } from './sample-minima.ts';

const a = sampleMinima(1990, [1.5, Number.NaN, 0], ['', '40 of 365 days missing', '']);
const none = sampleMinima(0, []);
const b = sampleMinima(2001, [7, 8], ['', 'gap at the low']);

test('unpackMinima gives back every field of every station, also of one without years', () => {
  const packed = packMinima([
    { stationId: 3, minima: a },
    { stationId: 9, minima: none },
    { stationId: 4, minima: b },
  ]);
  const back = unpackMinima(packed);
  expect([...back.keys()]).toEqual([3, 9, 4]);
  expect(back.get(3)).toEqual(a);
  expect(back.get(9)).toEqual(none);
  expect(back.get(4)).toEqual(b);
});

test('packed minima survive being stored and sent to another thread', () => {
  const packed = packMinima([{ stationId: 3, minima: a }]);
  expect(unpackMinima(deserialize(serialize(packed))).get(3)).toEqual(a);
  expect(unpackMinima(structuredClone(packed)).get(3)).toEqual(a);
});

test('joinPacked of parts equals the pack of all', () => {
  const all = [
    { stationId: 3, minima: a },
    { stationId: 9, minima: none },
    { stationId: 4, minima: b },
  ];
  expect(joinPacked([packMinima(all.slice(0, 1)), packMinima([]), packMinima(all.slice(1))])).toEqual(packMinima(all));
});

test('packMinima leaves its input as it was', () => {
  const before = structuredClone(a);
  packMinima([{ stationId: 1, minima: a }]);
  expect(a).toEqual(before);
});
