import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';

const STATIONS = ['A1', 'B2', 'C3', 'D4'] as const;
const FIRST_DAY = dayNumber(1980, 1, 1);
const LAST_DAY = dayNumber(2009, 12, 31);

/** A made-up daily flow that falls slowly at A1, rises at B2 and is level elsewhere: wet in spring, low in autumn. */
function sampleFlow(station: string, day: number): number {
  const year = (day - FIRST_DAY) / 365.25;
  const drift = { A1: -0.02, B2: 0.02 }[station] ?? 0;
  const season = 1.2 + Math.cos(2 * Math.PI * (year - 0.25));
  const wobble = 0.1 * Math.sin(Math.floor(year) * 7.3 + station.charCodeAt(0));
  return Math.round(1000 * season * (1 + drift * (year - 15) + wobble)) / 1000;
}

/** Rows "station,date,flow" of the stations given, 1980–2009. */
export function longRows(stations: readonly string[] = STATIONS): string[] {
  const rows: string[] = [];
  for (const station of stations) {
    for (let day = FIRST_DAY; day <= LAST_DAY; day++)
      rows.push(`${station},${isoDate(day)},${sampleFlow(station, day)}`);
  }
  return rows;
}

/** Station D4 has no area. */
export const REGISTRY = `station_id,name,river,latitude,longitude,drainage_area_km2
A1,Alder Mill,Wethe,50.1,7.1,120
B2,Birch Ford,Wethe,50.2,7.2,340
C3,Cedar Weir,Lauch,50.3,7.3,80
D4,Dell Spring,,50.4,7.4,
`;

export const LAYER = JSON.stringify({
  type: 'FeatureCollection',
  features: [
    {
      type: 'Feature',
      properties: { name: 'Wethe' },
      geometry: {
        type: 'LineString',
        coordinates: [
          [7.1, 50.1],
          [7.2, 50.2],
        ],
      },
    },
  ],
});

export interface SampleFiles {
  registry: string;
  layer: string;
  flows: string;
  /** writes one more file and answers its path */
  write(name: string, text: string): string;
}

/** Writes a registry, a layer and the flows of four stations into a folder. */
export function sampleFiles(folder: string): SampleFiles {
  mkdirSync(folder, { recursive: true });
  const write = (name: string, text: string) => {
    const path = join(folder, name);
    writeFileSync(path, text);
    return path;
  };
  return {
    registry: write('stations.csv', REGISTRY),
    layer: write('rivers.geojson', LAYER),
    flows: write('flows.csv', `station,date,discharge_m3s\n${longRows().join('\n')}\n`),
    write,
  };
}
