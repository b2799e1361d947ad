import { describe, expect, test } from 'vitest';
import { chooseStations } from '@/app/regions/[region]/curves/choose-stations';
import { readChoice, readKind, shownFlows, writeChoice } from '@/app/regions/[region]/curves/curves-view';
import { boundsOfView } from '@/app/regions/[region]/curves/map-view';

describe('readChoice, writeChoice', () => {
  test.each([
    { way: 'steepest' } as const,
    { way: 'view' } as const,
    { way: 'all' } as const,
    { way: 'codes', codes: ['01', '02'] } as const,
    { way: 'codes', codes: [] } as const,
    { way: 'codes', codes: ['a,b', '100%'] } as const,
  ])('%o comes back from the address as it went in', (choice) => {
    const again = readChoice(writeChoice(choice.way === 'codes' ? { ...choice, codes: [...choice.codes] } : choice));
    expect(again).toEqual(choice);
  });

  test('a code that is no good percent-encoding is taken as it stands', () => {
    expect(readChoice('50%,x')).toEqual({ way: 'codes', codes: ['50%', 'x'] });
  });
});

test('readKind answers the period curve for anything it does not know', () => {
  expect(readKind(null)).toBe('period');
  expect(readKind('weekly')).toBe('period');
  expect(readKind('median-annual')).toBe('median-annual');
});

describe('shownFlows', () => {
  test('turns missing flows into null and keeps zeros', () => {
    expect(shownFlows([Number.NaN, 0, 1.234567], 'm³/s', 'metric')).toEqual([null, 0, 1.2346]);
  });

  test('1 m³/s is 35.315 ft³/s, and 10.93319559 L/s/km² are 1 ft³/s/mi²', () => {
    expect(shownFlows([1], 'm³/s', 'us')).toEqual([35.315]);
    expect(shownFlows([10.93319559], 'L/s/km²', 'us')).toEqual([1]);
  });

  test('ratios have no unit to change', () => {
    expect(shownFlows([0.5], '1', 'us')).toEqual([0.5]);
  });
});

describe('chooseStations', () => {
  const place = (code: string, latitude: number | null, longitude: number | null) => ({
    code,
    rank: null,
    latitude,
    longitude,
  });
  const stations = [place('a', 46, 14), place('b', 46.1, 14.1), place('c', -30, 150), place('d', null, null)];

  test('codes keep the order of the ranking, whatever order was asked for', () => {
    expect(chooseStations(stations, { way: 'codes', codes: ['c', 'a', 'nobody'] }, null)).toEqual(['a', 'c']);
  });

  test('all are all, those without a place too', () => {
    expect(chooseStations(stations, { way: 'all' }, null)).toEqual(['a', 'b', 'c', 'd']);
  });

  test('the steepest are the first six of the ranking', () => {
    const many = Array.from({ length: 9 }, (_, index) => place(String(index), null, null));
    expect(chooseStations(many, { way: 'steepest' }, null)).toEqual(['0', '1', '2', '3', '4', '5']);
  });

  test('in view are those inside the map’s view; without a view, all that have a place', () => {
    expect(chooseStations(stations, { way: 'view' }, '46.0000,14.0000,9')).toEqual(['a', 'b']);
    expect(chooseStations(stations, { way: 'view' }, null)).toEqual(['a', 'b', 'c']);
  });
});

describe('boundsOfView', () => {
  test('the whole world at zoom 0', () => {
    const bounds = boundsOfView('0,0,0');
    expect(bounds).toMatchObject({ west: -180, east: 180 });
    expect(bounds?.north).toBeGreaterThan(85);
  });

  test('at the equator a pane of 760 × 700 pixels at zoom 8 spans 4.175° by 3.845° (360° over 256·2⁸ pixels)', () => {
    const bounds = boundsOfView('0,10,8');
    expect((bounds?.east ?? 0) - (bounds?.west ?? 0)).toBeCloseTo((760 * 360) / 65_536, 9);
    expect((bounds?.north ?? 0) - (bounds?.south ?? 0)).toBeCloseTo((700 * 360) / 65_536, 2);
  });

  test('west lies east of east over the date line', () => {
    const bounds = boundsOfView('0,179.9,8');
    expect(bounds?.west).toBeGreaterThan(bounds?.east ?? 0);
  });

  test.each([null, '', 'here', '95,0,3', '1,2'])('%s is no view', (text) => {
    expect(boundsOfView(text)).toBeNull();
  });
});
