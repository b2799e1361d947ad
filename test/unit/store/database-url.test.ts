import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { databasePath, databaseUrl } from '../../../lib/store/database-url.ts';
import { slugOf } from '../../../lib/store/slug.ts';

test('databasePath() resolves relative URLs against the project’s root and keeps absolute ones', () => {
  expect(databasePath('file:./data/a.db')).toBe(resolve('data/a.db'));
  expect(databasePath('file:a.db')).toBe(resolve('a.db'));
  expect(databasePath('file:/tmp/a.db')).toBe('/tmp/a.db');
  expect(databasePath('file:///tmp/a%20b.db')).toBe('/tmp/a b.db');
  expect(databasePath('file:./a.db?connection_limit=1')).toBe(resolve('a.db'));
  expect(databasePath('')).toBe(resolve('data/hungerstone.db'));
});

test('databasePath() refuses what is no file', () => {
  for (const url of ['postgres://localhost/x', 'data/a.db', 'file::memory:']) {
    expect(() => databasePath(url), url).toThrow('DATABASE_URL must be a file');
  }
});

test('databaseUrl() and databasePath() are inverse', () => {
  for (const path of ['/tmp/a.db', '/tmp/with blank#and%.db']) expect(databasePath(databaseUrl(path))).toBe(path);
});

test('slugOf() keeps letters and digits of any script and makes the rest one hyphen', () => {
  expect(slugOf('Upper Wethe & Lauch (2024)')).toBe('upper-wethe-lauch-2024');
  expect(slugOf('  Ñuble — Río Äußeres ')).toBe('nuble-rio-ausseres');
  expect(slugOf('長江')).toBe('長江');
  expect(slugOf('Istanbul INDUS')).toBe('istanbul-indus');
  expect(slugOf('!!!')).toBe('region');
});
