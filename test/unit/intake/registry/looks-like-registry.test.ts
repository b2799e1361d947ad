import { expect, test } from 'vitest';
import { looksLikeRegistry } from '../../../../lib/intake/registry/looks-like-registry.ts';

const DAYS = Array.from({ length: 31 }, (_, at) => at + 1);
const looks = (text: string) => looksLikeRegistry(Buffer.from(text), true);

test.each([
  ['codes with positions', 'id,lat,lon\nA,47,8\nB,47.1,8.2\n'],
  ['codes with names', 'code;name\nA;Mill\n'],
  [
    'decimal positions in an agency’s table',
    '# sites\nagency_cd\tsite_no\tstation_nm\tdec_lat_va\tdec_long_va\n5s\t15s\t50s\t16s\t16s\nXY\t012\tMill\t47\t8\n',
  ],
  [
    'positions and the day on which each station was opened',
    'id,lat,lon,opened,start_date\nA,47,8,1931-05-01,1931-05-01\nB,47,8,1950-01-01,1950-01-01\n',
  ],
  [
    'positions and as many dated changes in every row',
    'id,lat,lon,changes\nA,47,8,2001-05-01 dam; 1999-01-01 gauge moved\nB,47,8,2002-05-01 dam; 1998-01-01 dam\n',
  ],
  ['a title above the header', 'Stations of the Kell,,\n\nstation_no,station_name,area_km2\n1,Mill,20\n'],
])('looksLikeRegistry is true of %s', (_, text) => {
  expect(looks(text)).toBe(true);
});

test.each([
  ['flows', 'date,flow_m3s\n2001-01-01,5\n'],
  ['flows of stations with their positions', 'station,lat,lon,date,flow\nA,47,8,2001-01-01,5\nA,47,8,2001-01-02,6\n'],
  ['flows by station', 'station,date,flow\nA,2001-01-01,5\n'],
  ['flows in a row a month', `id,name,year,month,${DAYS.join(',')}\nA,Mill,2001,1,${DAYS.join(',')}\n`],
  ['rows without a header', '1,2,3\n4,5,6\n'],
  ['words', 'nothing of the kind\n'],
  ['nothing', ''],
])('looksLikeRegistry is false of %s', (_, text) => {
  expect(looks(text)).toBe(false);
});
