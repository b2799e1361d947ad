import { expect, test } from 'vitest';
import { readRegistry } from '../../../lib/intake/read-registry.ts';
import { IntakeError, type Registry } from '../../../lib/intake/types.ts';
import { withFile } from './reading.ts';

const read = (content: string | Uint8Array): Promise<Registry> =>
  withFile(content, (path) => readRegistry(path, 'stations.csv'));

async function refusal(content: string | Uint8Array): Promise<IntakeError> {
  const outcome = await read(content).catch((error: unknown) => error);
  if (!(outcome instanceof IntakeError)) throw new Error('expected an IntakeError', { cause: outcome });
  return outcome;
}

test('readRegistry reads code, name, river, position, area and influence; codes stay text', async () => {
  const registry = await read(
    'id,name,river,latitude,longitude,drainage_area_km2,influence,source\n' +
      '007,"Mill, upper",Kell,47.25,-68.5,2252.7,Regulated,x\n8,,,,,,,\n',
  );
  expect(registry).toMatchObject({
    rows: 2,
    given: ['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'],
  });
  expect(registry.stations).toEqual([
    {
      ...{ code: '007', name: 'Mill, upper', river: 'Kell', latitude: 47.25, longitude: -68.5 },
      ...{ areaKm2: 2252.7, influence: 'regulated' },
    },
    { code: '8', name: '8', river: '', latitude: null, longitude: null, areaKm2: null, influence: 'unknown' },
  ]);
  expect(registry.warnings).toEqual([
    '1 stations have no position; they are not on the map.',
    '1 stations have no drainage area; they are left out where flows are compared by area.',
  ]);
});

test.each([
  ['Station No;Station Name;Watercourse;Lat;Long;Area (km²)', '1;Mill;Kell;47,5;-68,5;25,5', 25.5],
  [
    'site_no\tstation_nm\tstream\tdec_lat_va\tdec_long_va\tArea (mi2)',
    '1\tMill\tKell\t47.5\t-68.5\t10',
    25.89988110336,
  ],
  ['code,station,river,y,x,area_ha', '1,Mill,Kell,47.5,-68.5,2550', 25.5],
  ['gaugeId,gaugeName,waterbody,gauge_lat,gauge_lon,area,area_unit', '1,Mill,Kell,47.5,-68.5,25500000,m2', 25.5],
  [
    '# a comment\nsite_no\tsite_name\triver\tlat\tlng\tcatchment_area_acres\n5s\t9s\t9s\t9n\t9n\t9n',
    '1\tMill\tKell\t47.5\t-68.5\t1000',
    4.0468564224,
  ],
  ['List of stations,,,,,\n\nstation,name,river,lat,lon,sq_km_area', '1,Mill,Kell,47.5,-68.5,25.5', 25.5],
])('readRegistry finds the columns of “%s”', async (header, row, areaKm2) => {
  const { stations } = await read(`${header}\n${row}\n`);
  expect(stations).toEqual([
    { code: '1', name: 'Mill', river: 'Kell', latitude: 47.5, longitude: -68.5, areaKm2, influence: 'unknown' },
  ]);
});

test('readRegistry says which facts a file speaks of, and reads Latin-1 and CRLF', async () => {
  const registry = await read(Buffer.from('code;name\r\nA;Mühle\r\n', 'latin1'));
  expect(registry.given).toEqual(['name']);
  expect(registry.stations[0].name).toBe('Mühle');
  expect(registry.warnings).toEqual([]);
});

test('readRegistry takes the area column that states its unit, and says so', async () => {
  const registry = await read('id,area_old,area_km2\nA,9,5\n');
  expect(registry.stations[0].areaKm2).toBe(5);
  expect(registry.warnings).toContain('The area was taken from “area_km2”, not from “area_old”.');
});

const HEADER = 'id,name,lat,lon,area_km2,influence';

test.each([
  ['latitude 95', 'B,b,95,10,5,', '95', /latitude is not a number from −90 to 90/],
  ['longitude 181', 'B,b,45,181,5,', '181', /longitude/],
  ['latitude as text', "B,b,45°12',10,5,", "45°12'", /latitude/],
  ['a latitude alone', 'B,b,45,,5,', 'B', /latitude but no longitude/],
  ['area 0', 'B,b,45,10,0,', '0', /more than 0/],
  ['negative area', 'B,b,45,10,-3,', '-3', /more than 0/],
  ['area as text', 'B,b,45,10,large,', 'large', /not a number/],
  ['a repeated code', 'A,b,45,10,5,', 'A', /already in row 2/],
  ['no code', ',b,45,10,5,', '', /no station code/],
  ['an influence that is none', 'B,b,45,10,5,haunted', 'haunted', /influence/],
  [
    'a row with a field too many',
    'B,b,x,45,10,5,natural',
    'B, b, x, 45, 10, 5, natural',
    /7 fields where the header has 6/,
  ],
  ['a row cut short', 'B,b,45', 'B, b, 45', /3 fields where the header has 6/],
])('readRegistry refuses %s, naming file, row, value and remedy', async (_, row, value, message) => {
  const error = await refusal(`${HEADER}\nA,a,45,10,5,natural\n${row}\n`);
  expect(error.problem).toMatchObject({ file: 'stations.csv', row: 3, value });
  expect(error.problem.message).toMatch(message);
  expect(error.problem.remedy.length).toBeGreaterThan(10);
  expect(error.problem.rows).toEqual([{ row: 3, text: row, reason: error.problem.message }]);
});

test('readRegistry lists every row at fault: it is taken whole or not at all', async () => {
  const bad = Array.from({ length: 8 }, (_, at) => `S${at},s,${at % 2 ? 95 : 45},10,${at % 3},`);
  const error = await refusal(`${HEADER}\n${bad.join('\n')}\n`);
  expect(error.problem.rows?.map(({ row }) => row)).toEqual([2, 3, 5, 7, 8, 9]);
  expect(error.message).toMatch(/Also row 3: .*and 1 more\. The registry is taken whole or not at all/);
});

test.each([
  ['an empty file', '', /empty/],
  ['UTF-16', Buffer.from('\uFEFFid,name\nA,a\n', 'utf16le'), /UTF-16/],
  ['a header alone', `${HEADER}\n`, /no stations/],
  ['no column of codes', 'colour,size\nred,5\n', /no header names a column of station codes/],
  ['an area without a unit', 'id,area\nA,5\n', /which unit its areas are/],
  ['a quote left open', 'id,name\nA,"Mill\nB,b\n', /cannot be split/],
])('readRegistry refuses %s', async (_, content, message) => {
  const error = await refusal(content);
  expect(error.problem.message).toMatch(message);
  expect(error.problem.remedy.length).toBeGreaterThan(10);
});
