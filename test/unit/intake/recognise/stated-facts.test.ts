import { describe, expect, test } from 'vitest';
import { factOfKey } from '../../../../lib/intake/recognise/fact-words.ts';
import {
  factsIn,
  factsOf,
  pairOf,
  pairsAcross,
  stationsListed,
} from '../../../../lib/intake/recognise/stated-facts.ts';

test.each([
  ['Station number', 'code'],
  ['Station', 'station'],
  ['siteNo', 'code'],
  ['XYZ-No.', 'code'],
  ['Messstellennummer', 'code'],
  ['Pegelname', 'name'],
  ['Gewässer', 'river'],
  ['River name', 'river'],
  ["Cours d'eau", 'river'],
  ['Latitude (DD)', 'latitude'],
  ['Geographische Länge', 'longitude'],
  ['Catchment area (km²)', 'area'],
  ['Drainage basin area', 'area'],
  ['Einzugsgebietsgröße', 'area'],
  ['Einheit', 'unit'],
  ['Units', 'unit'],
  ['Country code', null],
  ['Parameter code', null],
  ['Next downstream station', null],
  ['Quality code', null],
  ['Telephone number', null],
  ['Altitude', null],
  ['Time zone', null],
])('factOfKey(“%s”) is %s', (key, kind) => {
  expect(factOfKey(key)).toBe(kind);
});

test.each([
  ['# Station:   Mill Bridge', null, { key: 'Station', value: 'Mill Bridge' }],
  ['#station_no;15012', ';', { key: 'station_no', value: '15012' }],
  ['"Station number","0306"', ',', { key: 'Station number', value: '0306' }],
  ['Einheit:;m³/s', ';', { key: 'Einheit', value: 'm³/s' }],
  ['Site = X1', null, { key: 'Site', value: 'X1' }],
  ['Station:', null, null],
  ['no pair at all', null, null],
])('pairOf(%j), delimiter %j', (text, delimiter, pair) => {
  expect(pairOf(text, delimiter)).toEqual(pair);
});

test('pairsAcross takes a row of keys over a row of values, and nothing that is no such rows', () => {
  expect(pairsAcross(['Site no', 'River', 'x'], ['12', 'Ach', ''])).toEqual([
    { key: 'Site no', value: '12' },
    { key: 'River', value: 'Ach' },
  ]);
  expect(pairsAcross(['12', 'Ach'], ['13', 'Aar'])).toEqual([]);
});

describe('factsIn', () => {
  const facts = (lines: Record<string, string>) =>
    factsIn(Object.entries(lines).map(([key, value]) => ({ key, value })));

  test.each([
    ['47.25', 47.25],
    ['47,25', 47.25],
    ['47° 15\' 00" N', 47.25],
    ['47 15', 47.25],
    ["33°30'S", -33.5],
    ['-33.5', -33.5],
  ])('reads the latitude %s as %d', (text, latitude) => {
    expect(facts({ Latitude: text, Longitude: '8' })).toEqual({ latitude, longitude: 8 });
  });

  test.each(['91', "47° 75'", '5 412 345', '47.25 O', 'north', '47° 15\' 10" 3'])(
    'reads no latitude from %s',
    (text) => {
      expect(facts({ Latitude: text, Longitude: '8' })).toEqual({});
    },
  );

  test.each([
    ['Area (km²)', '1202,7', 1202.7],
    ['Area', '100 ha', 1],
    ['Area (km2)', '159 300', 159300],
    ['Area (km2)', '1,234.5', 1234.5],
    ['Area (km2)', "1'234", 1234],
  ])('reads %s: %s as %d km²', (key, value, areaKm2) => {
    expect(facts({ [key]: value })).toEqual({ areaKm2 });
  });

  test.each([
    ['Area', '12.5'],
    ['Area (km2)', '1,234'],
    ['Area (km2)', '0'],
    ['Area (km2)', 'large'],
  ])('reads no area from %s: %s', (key, value) => {
    expect(facts({ [key]: value })).toEqual({});
  });

  test('takes a bare “Station” for a number, a name, or both', () => {
    expect(facts({ Station: '0306' })).toEqual({ code: '0306' });
    expect(facts({ Station: 'Mill Bridge' })).toEqual({ name: 'Mill Bridge' });
    expect(facts({ Station: '03062500 - Mill Bridge' })).toEqual({ code: '03062500', name: 'Mill Bridge' });
  });
});

test('stationsListed reads office, number and name; factsOf keeps those of stations that the file has', () => {
  const listed = stationsListed([
    '#    XYZS 03062500 MILL CREEK AT DAM, WV',
    '#    XYZS 03062501 OTHER',
    '# Data for 2 sites',
  ]);
  expect(listed).toEqual([
    { code: '03062500', name: 'MILL CREEK AT DAM, WV' },
    { code: '03062501', name: 'OTHER' },
  ]);
  expect(factsOf(listed, ['03062501', '7'])).toEqual([{ code: '03062501', name: 'OTHER' }]);
  expect(factsOf([{ code: '12', name: 'Au' }], ['A7'])).toEqual([{ code: 'A7', name: 'Au' }]);
  expect(factsOf([{ name: 'Au' }], ['A', 'B'])).toEqual([]);
});
