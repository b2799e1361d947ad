import { readdirSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import type { ImportOutcome } from '../../../lib/jobs/import-types.ts';
import { rejectedFolder } from '../../../lib/jobs/rejected-rows.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { importedRegion } from '../api/imported-region.ts';
import { databaseContent } from './database-content.ts';
import { longRows, type SampleFiles, sampleFiles } from './sample-files.ts';

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

async function outcomeOf(name: string, content: string | Buffer): Promise<ImportOutcome> {
  const path = files.write(name, content as string);
  const { result } = await launchImport({
    region: { id: place.region.id },
    files: [{ path, name }],
    choices: {},
  });
  return result.catch((error: { result?: ImportOutcome }) => {
    if (!error.result) throw error;
    return error.result;
  });
}

test.each([
  ['an empty file', 'empty.csv', '', undefined],
  ['a binary file', 'binary.csv', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 1, 2, 3, 0, 0, 255, 254]), undefined],
  ['UTF-16', 'utf16.csv', Buffer.from(utf16(HEADER + GOOD), 'utf16le'), undefined],
  ['a header and nothing else', 'header.csv', HEADER, undefined],
  ['a station that is not in the registry', 'unknown.csv', `${HEADER}Z9,2010-01-01,3\nZ9,2010-01-02,3\n`, 'Z9'],
  ['two unlike values for a day', 'twice.csv', `${HEADER}${GOOD}A1,2010-01-02,99\n`, '99'],
  ['a station code that stands twice', 'codes.csv', 'station_id,name,latitude,longitude\nQ1,A,50,7\nQ1,B,51,7\n', 'Q1'],
  ['latitude 95', 'latitude.csv', 'station_id,name,latitude,longitude\nQ1,A,95,7\nQ2,B,51,7\n', '95'],
  ['a drainage area of 0', 'area0.csv', 'station_id,name,drainage_area_km2\nQ1,A,0\n', '0'],
  ['a negative drainage area', 'area.csv', 'station_id,name,drainage_area_km2\nQ1,A,-12\n', '-12'],
  ['only text in the flow column', 'text.csv', `${HEADER}A1,2010-01-01,low\nA1,2010-01-02,lower\n`, undefined],
  ['a single line without end', 'line.csv', `${HEADER}${'1234567890'.repeat(400_000)}`, undefined],
  ['a layer that is no GeoJSON', 'layer.geojson', '{"type": "Nothing"}', undefined],
  ['a layer that is cut short', 'cut.geojson', '{"type": "FeatureCollection", "features": [', undefined],
])('%s is refused with the file, the fault and a remedy, and changes nothing', async (_what, name, content, value) => {
  const { taken, problems } = await outcomeOf(name, content);
  expect(taken).toEqual([]);
  expect(problems).toHaveLength(1);
  expect(problems[0]).toMatchObject({
    file: name,
    problem: { message: expect.any(String), remedy: expect.any(String) },
  });
  expect(problems[0].problem!.remedy.length).toBeGreaterThan(10);
  expect(problems[0].message.startsWith(name)).toBe(true);
  if (value !== undefined) expect(problems[0].message).toContain(value);
  expect(databaseContent(databasePath())).toBe(before);
});

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
