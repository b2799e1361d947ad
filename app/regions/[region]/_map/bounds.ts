import type { MapRow } from '../map-row.ts';
import { hasPlace } from '../row-filter.ts';

/** South-west and north-east corner of all stations with a place, or null when none has one. */
export function stationBounds(rows: MapRow[]): [[number, number], [number, number]] | null {
  let [south, west, north, east] = [90, 540, -90, -540];
  for (const row of rows) {
    if (!hasPlace(row)) continue;
    south = Math.min(south, row.latitude);
    north = Math.max(north, row.latitude);
    west = Math.min(west, row.longitude);
    east = Math.max(east, row.longitude);
  }
  return south > north
    ? null
    : [
        [south, west],
        [north, east],
      ];
}

/** The atlas's part about the stations: their box with as much again on each side, whole degrees, within the world.
 *  @returns "west,south,east,north" */
export function outlineBox([[south, west], [north, east]]: [[number, number], [number, number]]): string {
  const [high, wide] = [Math.max(4, north - south), Math.max(6, east - west)];
  return [
    Math.max(-180, Math.floor(west - wide)),
    Math.max(-90, Math.floor(south - high)),
    Math.min(180, Math.ceil(east + wide)),
    Math.min(90, Math.ceil(north + high)),
  ].join(',');
}
