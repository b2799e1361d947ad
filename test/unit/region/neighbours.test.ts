import { geoDistance } from 'd3-geo';
import { expect, test } from 'vitest';
import { distanceKm, nearestStations, stationsOnRiver } from '../../../lib/region/neighbours.ts';
import { facts } from './region-fixtures.ts';

const here = facts('here', { latitude: 50, longitude: 10, river: 'Aller' });
const near = facts('near', { latitude: 50.1, longitude: 10, river: ' aller ' });
const far = facts('far', { latitude: 52, longitude: 12, river: 'Aller' });
const other = facts('other', { latitude: 50.05, longitude: 10, river: 'Brede' });
const lost = facts('lost', { latitude: null, longitude: null, river: 'Aller' });
const all = [far, lost, here, other, near];

test('nearestStations lists the nearest first, without the station itself and those without a place', () => {
  expect(nearestStations(here, all, 5).map(({ code }) => code)).toEqual(['other', 'near', 'far']);
  expect(nearestStations(here, all, 2).map(({ code }) => code)).toEqual(['other', 'near']);
  expect(nearestStations(here, all, 0)).toEqual([]);
});

test('nearestStations gives code, name and km', () => {
  // a tenth of a degree of a meridian of 6371.0088 km radius
  expect(nearestStations(here, [near], 1)).toEqual([
    { code: 'near', name: 'Invented near', km: expect.closeTo((6371.0088 * Math.PI) / 1800, 9) },
  ]);
});

test('nearestStations of a station without a place, or alone, is empty', () => {
  expect(nearestStations(lost, all, 5)).toEqual([]);
  expect(nearestStations(here, [here], 5)).toEqual([]);
});

test('nearestStations lists equal distances by code and refuses a number that is none', () => {
  const twins = ['b', 'a'].map((code) => facts(code, { latitude: 51, longitude: 10 }));
  expect(nearestStations(here, twins, 5).map(({ code }) => code)).toEqual(['a', 'b']);
  expect(() => nearestStations(here, all, 1.5)).toThrow('most must be a whole number of at least 0, got 1.5');
});

test('stationsOnRiver compares names without case and spaces, those without a place last', () => {
  expect(stationsOnRiver(here, all).map(({ code, km }) => [code, km === null])).toEqual([
    ['near', false],
    ['far', false],
    ['lost', true],
  ]);
  expect(stationsOnRiver(other, all)).toEqual([]);
  expect(stationsOnRiver(facts('none', { river: ' ' }), [facts('also', { river: '' })])).toEqual([]);
});

test('distanceKm agrees with d3-geo, also over the date line and pole to pole', () => {
  const places: [number, number][] = [
    [10, 50],
    [-179.9, -45],
    [179.9, -45.2],
    [0, 90],
    [0, -90],
    [-70.5, 12.25],
  ];
  for (const [longitude, latitude] of places) {
    for (const [toLongitude, toLatitude] of places) {
      const km = distanceKm({ latitude, longitude }, { latitude: toLatitude, longitude: toLongitude });
      expect(km).toBeCloseTo(6371.0088 * geoDistance([longitude, latitude], [toLongitude, toLatitude]), 3);
    }
  }
});
