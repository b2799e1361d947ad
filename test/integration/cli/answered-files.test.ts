import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import type { Mapping } from '../../../lib/intake/types.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { databaseContent } from '../jobs/database-content.ts';
import { type Content, registeredRegion, storedDays } from '../jobs/registered-region.ts';
import { runCommand } from './run-command.ts';

/** What the import command is asked, it is told by a flag or a mapping. */
const place = registeredRegion();

const HEADER = 'station,date,discharge_m3s\n';
const sheet = (name: string, value: number) => ({
  name,
  rows: [
    ['station', 'date', 'flow m3/s'],
    ['A1', '2003-10-01', value],
    ['A1', '2003-10-02', value],
  ]
    .map((row, at) => rowOf(at + 1, row))
    .join(''),
});

const given = (name: string, content: Content): string => {
  const path = join(place.folder, name);
  writeFileSync(path, content);
  return path;
};
const run = (...flags: string[]) => runCommand('import', '--region', 'Upper Wethe', ...flags);

const MAPPED: [string, Content, remedy: string, Partial<Mapping>, Record<string, number>][] = [
  [
    'century.csv',
    `${HEADER}A1,01-Feb-29,1\nA1,13-Feb-29,2\n`,
    '{"firstYear": 1930}',
    { firstYear: 1920 },
    { '1929-02-01': 1, '1929-02-13': 2 },
  ],
  [
    'thousands.csv',
    'station;date;discharge_m3s\nA1;2003-04-01;1,234\nA1;2003-04-02;2,345\n',
    '{"thousands": ","}',
    { thousands: ',' },
    { '2003-04-01': 1234, '2003-04-02': 2345 },
  ],
  [
    'order.csv',
    `${HEADER}A1,01/02/2003,1\nA1,02/02/2003,2\n`,
    '"order": "dmy"',
    { date: { columns: [1], order: 'mdy' } },
    { '2003-01-02': 1, '2003-02-02': 2 },
  ],
  [
    'units.csv',
    'station,date,flow,unit\nA1,2003-06-01,1,m3/s\nA1,2003-06-02,35,ft3/s\n',
    '{"where": {"column": "unit", "equals": "m3/s"}}',
    { where: { column: 'unit', equals: 'ft3/s' } },
    { '2003-06-02': 35 },
  ],
  [
    'sheets.xlsx',
    handMade({ sheets: [sheet('Old', 1), sheet('New', 2)] }),
    'Say which sheet is to be read: “Old”, “New”',
    { sheet: 'New' },
    { '2003-10-01': 2, '2003-10-02': 2 },
  ],
  [
    'series.xml',
    collection(
      { station: 'A1', property: 'Stage', uom: 'code="m"', points: daily(['1.5']) },
      { station: 'A1', property: 'Rainfall', uom: 'code="mm"', points: daily(['7', '8']) },
    ),
    'say which series is to be taken, and as what',
    { quantity: 'rainfall' },
    { '2001-01-01': 7, '2001-01-02': 8 },
  ],
];

const LISTS: [string, Content, remedy: string][] = [
  ['east.csv', 'station_id,latitude,longitude\nE1,50.4,252.75\n', '(--correct longitude-360)'],
  ['areas.csv', 'station_id,drainage_area\nE1,100\n', 'km², mi², ha, acres (--area-unit)'],
];

test('import asks for what each of many files leaves open, and takes none of them', async () => {
  const before = databaseContent(databasePath());
  const lists = LISTS.map(([name, content]) => given(name, content)).flatMap((path) => ['--stations', path]);
  const { code, stdout, stderr } = await run(...lists, ...MAPPED.map(([name, content]) => given(name, content)));
  expect([code, stdout]).toEqual([1, '']);
  for (const [name, , remedy] of [...LISTS, ...MAPPED])
    expect(stderr.split('\n').filter((line) => line.includes(name) && line.includes(remedy))).not.toEqual([]);
  expect(databaseContent(databasePath()) === before).toBe(true);
});

test.each(MAPPED)('import --mapping answers what %s leaves open', async (name, content, _remedy, mapping, days) => {
  const before = await storedDays(place, 'A1');
  const flags = ['--mapping', given('mapping.json', JSON.stringify(mapping))];
  const { code, stdout } = await run(...flags, given(name, content));
  expect([code, stdout.includes(name)]).toEqual([0, true]);
  expect(await storedDays(place, 'A1')).toEqual({ ...before, ...days });
});

test('import --correct and --area-unit answer what a list of stations leaves open', async () => {
  const list = given('list.csv', 'station_id,latitude,longitude,drainage_area\nE1,50.4,252.75,100\n');
  const { code } = await run('--correct', 'longitude-360', '--area-unit', 'ha', '--stations', list);
  expect(code).toBe(0);
  // 1 ha = 0.01 km².
  expect(await getStation(place.region.id, 'E1')).toMatchObject({ longitude: -107.25, areaKm2: 1 });
});
