import { describe, expect, test } from 'vitest';
import { readRegistry } from '../../../lib/intake/read-registry.ts';
import { IntakeError, type Registry, type RegistryOptions } from '../../../lib/intake/types.ts';
import { withFile } from './reading.ts';

const read = (content: string | Uint8Array, options: RegistryOptions = {}): Promise<Registry> =>
  withFile(content, (path) => readRegistry(path, 'stations.csv', options));

async function refusal(content: string | Uint8Array, options: RegistryOptions = {}): Promise<IntakeError> {
  const outcome = await read(content, options).catch((error: unknown) => error);
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
  ['latitude as text', 'B,b,north,10,5,', 'north', /latitude/],
  ['a latitude alone', 'B,b,45,,5,', 'B', /latitude but no longitude/],
  ['area 0', 'B,b,45,10,0,', '0', /more than 0/],
  // The Amazon drains about 7 million km².
  [
    'an area larger than any river’s',
    'B,b,45,10,10000001,',
    '10000001',
    /10000001 km² is larger than that of any river/,
  ],
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

describe('coordinates', () => {
  const places = (rows: [number | string, number | string][]) =>
    ['id,lat,lon', ...rows.map(([lat, lon], at) => `S${at},${lat},${lon}`)].join('\n');
  const positions = ({ stations }: Registry) => stations.map(({ latitude, longitude }) => [latitude, longitude]);

  test('readRegistry reads degrees, minutes and seconds, and decimal commas in quotes', async () => {
    const dms = await read('id,lat,lon\nA,47°15′36″N,68°30′W\n');
    expect(positions(dms)).toEqual([[47.26, -68.5]]);
    const commas = await read('id,lat,lon,area_km2\nA,"47,25","-68,5","1234,5"\n');
    expect(positions(commas)).toEqual([[47.25, -68.5]]);
    expect(commas.stations[0].areaKm2).toBe(1234.5);
  });

  test('readRegistry asks about columns that are swapped, and swaps them back on demand', async () => {
    const text = places([
      [-100, 45],
      [-101, 46],
      [-88, 44],
      [-95, 43],
    ]);
    const { problem } = await refusal(text);
    expect(problem).toMatchObject({
      needs: 'correction',
      corrections: ['swap-coordinates'],
      row: 2,
      value: '-100, 45',
    });
    expect(problem.rows?.map(({ row }) => row)).toEqual([2, 3, 4, 5]);
    const registry = await read(text, { corrections: ['swap-coordinates'] });
    expect(positions(registry)).toEqual([
      [45, -100],
      [46, -101],
      [44, -88],
      [43, -95],
    ]);
    expect(registry.warnings).toEqual(['4 stations had latitude and longitude swapped back, as asked.']);
  });

  test('readRegistry tells one swapped row by the others, and puts that one right alone', async () => {
    const text = places([
      [47, 8],
      [47.5, 8.5],
      [8.2, 46.9],
      [46.8, 9],
    ]);
    expect((await refusal(text)).problem.rows?.map(({ row }) => row)).toEqual([4]);
    expect(positions(await read(text, { corrections: ['swap-coordinates'] }))).toEqual([
      [47, 8],
      [47.5, 8.5],
      [46.9, 8.2],
      [46.8, 9],
    ]);
  });

  test('readRegistry tells swapped columns by where the region lies, and leaves alone what it cannot tell', async () => {
    const text = places([
      [8, 47],
      [8.5, 47.5],
    ]);
    expect(positions(await read(text))).toEqual([
      [8, 47],
      [8.5, 47.5],
    ]);
    expect((await refusal(text, { near: [7, 46, 10, 48] })).problem.rows).toHaveLength(2);
    expect(positions(await read(text, { near: [45, 7, 49, 10] }))).toEqual([
      [8, 47],
      [8.5, 47.5],
    ]);
  });

  test('readRegistry asks about longitudes from 0 to 360, and about both corrections one after the other', async () => {
    const east = places([
      [45, 250],
      [46, 251.5],
      [44, 179],
    ]);
    const { problem } = await refusal(east);
    expect(problem).toMatchObject({ needs: 'correction', corrections: ['longitude-360'] });
    expect(problem.rows?.map(({ row }) => row)).toEqual([2, 3]);
    const turned = await read(east, { corrections: ['longitude-360'] });
    expect(positions(turned)).toEqual([
      [45, -110],
      [46, -108.5],
      [44, 179],
    ]);
    const both = places([
      [250, 45],
      [251.5, 46],
    ]);
    expect((await refusal(both)).problem.corrections).toEqual(['swap-coordinates']);
    expect((await refusal(both, { corrections: ['swap-coordinates'] })).problem.corrections).toEqual(['longitude-360']);
    expect(positions(await read(both, { corrections: ['swap-coordinates', 'longitude-360'] }))).toEqual([
      [45, -110],
      [46, -108.5],
    ]);
  });

  test('readRegistry doubts stations in Antarctica, and takes them where a person says so', async () => {
    const text = places([
      [-76.5, 39.25],
      [-76.75, 39.5],
    ]);
    const { problem } = await refusal(text);
    expect(problem.corrections).toEqual(['swap-coordinates', 'none']);
    expect(positions(await read(text, { corrections: ['swap-coordinates'] }))[0]).toEqual([39.25, -76.5]);
    expect(positions(await read(text, { corrections: ['none'] }))[0]).toEqual([-76.5, 39.25]);
    const impossible = places([
      [-100, 45],
      [-101, 46],
    ]);
    expect((await refusal(impossible, { corrections: ['none'] })).problem.corrections).toEqual(['swap-coordinates']);
    // Swapped, these would lie nowhere.
    expect(positions(await read(places([[-77.5, 162.5]])))).toEqual([[-77.5, 162.5]]);
  });

  test('readRegistry takes no slip of the pen for a swap', async () => {
    const error = await refusal(
      places([
        [45, 10],
        [45.2, 10.5],
        [95, 10],
      ]),
    );
    expect(error.problem.needs).toBeUndefined();
    expect(error.problem).toMatchObject({ row: 4, value: '95' });
  });
});

describe('what is known beyond the facts', () => {
  test('readRegistry reads named flows, dated changes and notes from columns', async () => {
    const registry = await read(
      'id,legal_minimum_m3s,abstraction_stop_l_s,changes,notes\nA,0.25,300,"1999-01-01 dam: Kell",by the mill\nB,,,,\n',
    );
    expect(registry.given).toEqual(['changes', 'namedFlows', 'notes']);
    expect(registry.stations[0]).toMatchObject({
      changes: [{ date: '1999-01-01', kind: 'dam', note: 'Kell' }],
      namedFlows: [
        { name: 'legal minimum', kind: 'legal minimum', value: 0.25, unit: 'm3/s', months: null },
        { name: 'abstraction stop', kind: 'abstraction stop', value: 300, unit: 'L/s', months: null },
      ],
      notes: 'by the mill',
    });
    expect(registry.stations[1]).toMatchObject({ changes: [], namedFlows: [], notes: '' });
  });

  test('readRegistry reads GeoJSON points by the same headings, lists and recipes among their properties', async () => {
    const changes = [{ date: '1999-01-01', kind: 'dam', note: '' }];
    const derived = { quantity: 'flow', terms: [{ code: 'A', factor: -1, lagDays: 2 }], note: 'gain' };
    const feature = (properties: object, coordinates: number[] | null) => ({
      ...{ type: 'Feature', properties },
      geometry: coordinates && { type: 'Point', coordinates },
    });
    const registry = await read(
      JSON.stringify({
        type: 'FeatureCollection',
        features: [
          feature({ station_code: '007', drainage_area_mi2: 10, lat: 1, changes, derived }, [-68.5, 47.25, 12]),
          feature({ station_code: '8', station_name: 'Mill' }, null),
        ],
      }),
    );
    expect(registry.stations).toEqual([
      {
        ...{ code: '007', name: '007', river: '', latitude: 47.25, longitude: -68.5, areaKm2: 25.89988110336 },
        ...{ influence: 'unknown', changes, derived },
      },
      {
        ...{ code: '8', name: 'Mill', river: '', latitude: null, longitude: null, areaKm2: null },
        ...{ influence: 'unknown', changes: [], derived: null },
      },
    ]);
  });

  test('readRegistry takes the id of features for the code where no property is one', async () => {
    const point = { type: 'Point', coordinates: [8, 47] };
    const registry = await read(
      JSON.stringify({ type: 'Feature', id: 12, properties: { river: 'Kell' }, geometry: point }),
    );
    expect(registry.stations[0]).toMatchObject({ code: '12', river: 'Kell', latitude: 47, longitude: 8 });
  });

  test.each([
    ['changes', 'id,changes\nA,dam in 1999\n', /no date/],
    ['changes as JSON', 'id;changes\nA;"[{""date"":""1999-13-01""}]"\n', /dated changes cannot be read/],
    ['named flows', 'id;named_flows\nA;"{""value"":1}"\n', /named flows cannot be read/],
    ['a named flow without a unit', 'id,residual_flow\nA,3\n', /in which unit/],
    ['areas of which nothing says what the comma is', 'id;area_km2\nA;1,234\nB;2,500\n', /decimals or thousands/],
    [
      'lines in GeoJSON',
      '{"type":"Feature","properties":{"id":"A"},"geometry":{"type":"LineString","coordinates":[]}}',
      /no point/,
    ],
    [
      'GeoJSON without codes',
      '{"type":"Feature","properties":{"colour":"A"},"geometry":null}',
      /no property .* station code/,
    ],
    ['other JSON', '{"stations":[1]}', /not a GeoJSON/],
    ['JSON that was cut', '{"type":"FeatureCollection","features":[', /not valid JSON/],
  ])('readRegistry refuses %s', async (_, text, message) => {
    expect((await refusal(text)).problem.message).toMatch(message);
  });
});

test('readRegistry keeps to the sign that parts the header, however many dated changes its rows hold', async () => {
  const changes = '2001-05-01 dam: Upper Kell; 1999-01-01 gauge moved';
  const { stations } = await read(`code,name,changes\nA,Mill,${changes}\nB,Ford,${changes}\n`);
  expect(stations.map(({ code, name, changes: found }) => [code, name, found?.length])).toEqual([
    ['A', 'Mill', 2],
    ['B', 'Ford', 2],
  ]);
});

test('readRegistry reads thousands where decimals have a point, and names codes that are alike', async () => {
  const { stations, warnings } = await read('id;lat;lon;area_km2\nA1;45.5;8.25;1,234.5\na1;45.6;8.3;2,500\n');
  expect(stations.map(({ areaKm2 }) => areaKm2)).toEqual([1234.5, 2500]);
  expect(warnings).toEqual(['Codes that differ only by case or leading zeros: “A1” and “a1”.']);
});

test('readRegistry asks for the unit of areas, and takes it where the file names none', async () => {
  const text = 'id,area_total\nA,10\n';
  expect((await refusal(text)).problem).toMatchObject({ needs: 'area', value: 'area_total' });
  expect((await read(text, { areaUnit: 'mi²' })).stations[0].areaKm2).toBe(25.89988110336);
  expect((await read('id,area_ha\nA,10\n', { areaUnit: 'mi²' })).stations[0].areaKm2).toBe(0.1);
  expect((await read('id,area,area_unit\nA,10,acres\n', { areaUnit: 'mi²' })).stations[0].areaKm2).toBe(0.040468564224);
});
