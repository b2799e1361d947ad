import { expect, test } from 'vitest';
import { outlineBox, stationBounds } from '@/app/regions/[region]/_map/bounds';
import { mapRow } from './map-row-builder.ts';

test('stationBounds holds all stations with a place and ignores the others', () => {
  const rows = [
    mapRow({ latitude: 46, longitude: 14 }),
    mapRow({ latitude: 47.5, longitude: 13 }),
    mapRow({ latitude: 80 }),
  ];
  expect(stationBounds(rows)).toEqual([
    [46, 13],
    [47.5, 14],
  ]);
  expect(stationBounds([mapRow({})])).toBeNull();
});

test('outlineBox reaches well past the stations and stays in the world', () => {
  expect(
    outlineBox([
      [46, 13],
      [47.5, 14],
    ]),
  ).toBe('7,42,20,52');
  expect(
    outlineBox([
      [-89, -179],
      [89, 179],
    ]),
  ).toBe('-180,-90,180,90');
});
