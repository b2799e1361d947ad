import { expect, test } from 'vitest';
import {
  apiHref,
  BASIS_PARAMETERS,
  carried,
  pairHref,
  regionHref,
  stationHref,
  yearHref,
} from '@/app/components/links';
import { BASIS_KEYS } from '@/lib/basis';

test('links carry every key of the basis', () => {
  expect([...BASIS_PARAMETERS]).toEqual(BASIS_KEYS);
});

test('regionHref keeps basis and map view and drops what belongs to one page', () => {
  expect(regionHref('kestrane-basin', 'curves', 'days=30&view=1,2,8&axis=log')).toBe(
    '/regions/kestrane-basin/curves?days=30&view=1,2,8',
  );
  expect(regionHref('kestrane-basin', 'map')).toBe('/regions/kestrane-basin');
});

test('stationHref takes codes with slashes and spaces as they are', () => {
  expect(stationHref('r', 'A/1 b', 'alpha=0.05')).toBe('/regions/r/stations/A%2F1%20b?alpha=0.05');
});

test('yearHref opens one year on the Records page, beside the basis', () => {
  expect(yearHref('r', 'A/1', 1987, 'days=30&sort=area')).toBe('/regions/r/records?days=30&station=A%2F1&year=1987');
});

test('apiHref takes only the basis along', () => {
  expect(apiHref('r', 'ranking', 'station=7&days=30&exclude=ice,suspect', 'csv')).toBe(
    '/api/regions/r/ranking?days=30&exclude=ice,suspect&format=csv',
  );
});

test('carried leaves its input as it was', () => {
  const query = new URLSearchParams('days=30&axis=log');
  carried(query);
  expect(query.toString()).toBe('days=30&axis=log');
});

test('how many of the steepest and what fills the discs go along from page to page', () => {
  expect(carried('k=3&fill=span&breaks=1990').toString()).toBe('k=3&fill=span');
});

test('pairHref names station and references, a comma inside a code by its number', () => {
  expect(pairHref('r', 'A1', 'days=30&station=Z9&with=Q')).toBe('/regions/r/pair?days=30&station=A1');
  expect(pairHref('r', 'A1', '', ['B2', 'C,3'])).toBe('/regions/r/pair?station=A1&with=B2,C%252C3');
  expect(pairHref('r', null, 'station=Z9')).toBe('/regions/r/pair');
});
