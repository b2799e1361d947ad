import { readdirSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { rejectedFolder } from '../../../lib/jobs/rejected-rows.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { importedRegion } from '../api/imported-region.ts';
import { databaseContent } from './database-content.ts';
import { refusalOf } from './registered-region.ts';
import { longRows, REGISTRY, type SampleFiles, sampleFiles } from './sample-files.ts';

const place = importedRegion();
let files: SampleFiles;
let before: string;
beforeAll(() => {
  files = sampleFiles(`${place.folder}/bad`);
  before = databaseContent(databasePath());
});
afterAll(() => {
  expect(databaseContent(databasePath())).toBe(before);
});

const HEADER = 'station,date,discharge_m3s\n';
/** Days after those that stand, so that nothing but the fault at hand is wrong with them. */
const GOOD = 'A1,2010-01-01,3.5\nA1,2010-01-02,3.4\n';
const utf16 = (text: string) => `\uFEFF${text}`;

const MONTHS = ['01', '02', '03', '04', '05', '06'];
const point = (coordinates: unknown[]) =>
  JSON.stringify({
    type: 'FeatureCollection',
    features: [{ type: 'Feature', properties: { code: 'Q1' }, geometry: { type: 'Point', coordinates } }],
  });
const line = (coordinates: unknown[]) =>
  point([]).replace('"Point","coordinates":[]', `"LineString","coordinates":${JSON.stringify(coordinates)}`);

test.each<[what: string, file: string, content: string | Buffer, row?: number, value?: string]>([
  ['an empty file', 'empty.csv', ''],
  ['a file of blank lines', 'blank.csv', '\n  \n\n'],
  ['a binary file', 'binary.csv', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 1, 2, 3, 0, 0, 255, 254])],
  ['UTF-16', 'utf16.csv', Buffer.from(utf16(HEADER + GOOD), 'utf16le'), 1, 'FF FE at the start'],
  [
    'UTF-16, high bytes first',
    'utf16.csv',
    Buffer.from(utf16(HEADER + GOOD), 'utf16le').swap16(),
    1,
    'FE FF at the start',
  ],
  ['a registry in UTF-16', 'stations.csv', Buffer.from(utf16(REGISTRY), 'utf16le'), 1],
  ['a header and nothing else', 'header.csv', HEADER, 1, 'station, date, discharge_m3s'],
  ['a station that is not in the registry', 'unknown.csv', `${HEADER}Z9,2010-01-01,3\nZ9,2010-01-02,3\n`, 2, 'Z9'],
  ['two unlike values for a day', 'twice.csv', `${HEADER}${GOOD}A1,2010-01-02,99\n`, 4, '99'],
  [
    'a station code that stands twice',
    'codes.csv',
    'station_id,name,latitude,longitude\nQ1,A,50,7\nQ1,B,51,7\n',
    3,
    'Q1',
  ],
  ['latitude 95', 'latitude.csv', 'station_id,name,latitude,longitude\nQ1,A,95,7\nQ2,B,51,7\n', 2, '95'],
  ['longitude 400', 'longitude.csv', 'station_id,latitude,longitude\nQ1,50,400\nQ2,51,7\n', 2, '400'],
  ['a longitude that is no number', 'words.csv', 'station_id,latitude,longitude\nQ1,50,east\nQ2,51,7\n', 2, 'east'],
  ['a latitude without a longitude', 'half.csv', 'station_id,latitude,longitude\nQ1,50,\nQ2,51,7\n', 2, 'Q1'],
  ['a point that is not on Earth', 'points.geojson', point([7, 95]), undefined, '95'],
  ['a drainage area of 0', 'area0.csv', 'station_id,name,drainage_area_km2\nQ1,A,0\n', 2, '0'],
  ['a negative drainage area', 'area.csv', 'station_id,name,drainage_area_km2\nQ1,A,-12\n', 2, '-12'],
  ['a drainage area larger than any', 'area9.csv', 'station_id,drainage_area_km2\nQ1,1e9\n', 2, '1e9'],
  ['a drainage area in words', 'words.csv', 'station_id,drainage_area_km2\nQ1,small\n', 2, 'small'],
  [
    'only text in the flow column',
    'text.csv',
    `${HEADER}A1,2010-01-01,low\nA1,2010-01-02,lower\n`,
    2,
    'A1,2010-01-01,low',
  ],
  ['two units among the values', 'units.csv', `${HEADER}A1,2010-01-01,1.5 m3/s\nA1,2010-01-02,35 cfs\n`, 3, '35 cfs'],
  [
    'columns in two units',
    'wide.csv',
    'date,A1 (m3/s),B2 (cfs)\n2010-01-01,1,2\n2010-01-02,1,2\n',
    undefined,
    'B2 (cfs)',
  ],
  [
    'one value a month',
    'month.csv',
    `${HEADER}${MONTHS.map((month) => `A1,2010-${month}-15,2\n`).join('')}`,
    undefined,
    'A1',
  ],
  [
    'dates that are months',
    'months.csv',
    `${HEADER}${MONTHS.map((month) => `A1,2010-${month},2\n`).join('')}`,
    2,
    'A1,2010-01,2',
  ],
  ['a single line without end', 'line.csv', `${HEADER}${'1234567890'.repeat(400_000)}`, 2],
  ['a layer that is no GeoJSON', 'layer.geojson', '{"type": "Nothing"}'],
  ['a layer that is cut short', 'cut.geojson', '{"type": "FeatureCollection", "features": ['],
  [
    'a layer cut within a feature',
    'cut.geojson',
    line([
      [7, 50],
      [7, 51],
    ]).slice(0, -12),
  ],
  [
    'a layer that is not on Earth',
    'far.geojson',
    line([
      [500, 50],
      [7, 51],
    ]),
    undefined,
    '[500,50]',
  ],
])(
  '%s is refused with the file, the fault and a remedy, and changes nothing',
  async (_what, name, content, row, value) => {
    const { problem } = await refusalOf(place, name, content);
    if (row !== undefined) expect(problem?.row).toBe(row);
    if (value !== undefined) expect(problem?.value).toBe(value);
  },
);

test('a bad row among many good ones is refused together with a file that is refused, and its list goes', async () => {
  const rejecting = files.write(
    'rows.csv',
    HEADER + longRows(['A1']).slice(0, 50).join('\n').replace('1980-01-31', '1980-02-31'),
  );
  const empty = files.write('none.csv', '');
  const given = [rejecting, empty].map((path) => ({ path, name: path.slice(path.lastIndexOf('/') + 1) }));
  const { result } = await launchImport({ region: { id: place.region.id }, files: given, choices: {} });
  await expect(result).rejects.toThrow('none.csv');
  let left: string[] = [];
  try {
    left = readdirSync(rejectedFolder());
  } catch {
    // the folder is made by the first rejected row that stays
  }
  expect(left).toEqual([]);
});
