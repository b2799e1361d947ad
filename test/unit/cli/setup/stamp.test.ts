import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { agreesWithLock } from '../../../../lib/cli/setup/install.js';
import { hashOf, readStamp, writeStamp } from '../../../../lib/cli/setup/stamp.js';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'hungerstone-stamp-'));
});
afterEach(() => rmSync(folder, { recursive: true }));
const put = (name: string, text: string) => writeFileSync(join(folder, name), text);

describe('hashOf', () => {
  beforeEach(() => {
    mkdirSync(join(folder, 'lib/deep'), { recursive: true });
    put('lib/a.ts', 'a');
    put('lib/deep/b.ts', 'b');
    put('schema', 's');
  });
  const hash = (leaveOut?: (name: string) => boolean) => hashOf(folder, ['lib', 'schema', 'absent'], leaveOut);

  test('stays while nothing changes, whichever order the entries are named in', () => {
    expect(hash()).toMatch(/^[0-9a-f]{64}$/);
    expect(hash()).toBe(hash());
    expect(hashOf(folder, ['schema', 'lib'])).toBe(hash());
  });
  test('changes with a content, a name, a new and a lost file', () => {
    const before = hash();
    put('lib/deep/b.ts', 'c');
    const edited = hash();
    put('lib/deep/b.ts', 'b');
    put('lib/c.ts', '');
    const added = hash();
    rmSync(join(folder, 'lib/c.ts'));
    expect(hash()).toBe(before);
    rmSync(join(folder, 'lib/a.ts'));
    const lost = hash();
    put('lib/z.ts', 'a');
    expect(new Set([before, edited, added, lost, hash()]).size).toBe(5);
  });
  test('does not take the end of one file for the start of the next', () => {
    const before = hash();
    put('lib/a.ts', 'ab');
    put('lib/deep/b.ts', '');
    expect(hash()).not.toBe(before);
  });
  test('leaves out what it is told to, whole folders too', () => {
    const before = hash((name) => name === 'lib/deep');
    put('lib/deep/b.ts', 'changed');
    expect(hash((name) => name === 'lib/deep')).toBe(before);
  });
});

test('writeStamp and readStamp agree; a missing or broken stamp is null; no half file stays', () => {
  const file = join(folder, 'made/on/the/way.json');
  expect(readStamp(file)).toBeNull();
  writeStamp(file, { sources: 'x' });
  expect(readStamp(file)).toEqual({ sources: 'x' });
  writeStamp(file, { sources: 'y' });
  expect(readStamp(file)).toEqual({ sources: 'y' });
  expect(readdirSync(join(folder, 'made/on/the'))).toEqual(['way.json']);
  put('broken.json', '{"sources": ');
  expect(readStamp(join(folder, 'broken.json'))).toBeNull();
});

describe('agreesWithLock', () => {
  const entry = (version: string, more = {}) => ({ version, integrity: `sha512-${version}`, ...more });
  const lock = {
    packages: {
      '': { name: 'us' },
      'node_modules/a': entry('1.0.0'),
      'node_modules/b': entry('2.0.0'),
      'node_modules/other-system': entry('1.0.0', { optional: true }),
    },
  };
  const { '': _, ...installed } = lock.packages;

  test('is true when every package is there, and when only an optional one is not', () => {
    expect(agreesWithLock(lock, { packages: installed })).toBe(true);
    const { 'node_modules/other-system': __, ...needed } = installed;
    expect(agreesWithLock(lock, { packages: needed })).toBe(true);
  });
  test('is false when one is missing, of another version, of another content, or too many', () => {
    const { 'node_modules/a': __, ...missing } = installed;
    expect(agreesWithLock(lock, { packages: missing })).toBe(false);
    expect(agreesWithLock(lock, { packages: { ...installed, 'node_modules/a': entry('1.0.1') } })).toBe(false);
    const other = { version: '1.0.0', integrity: 'sha512-other' };
    expect(agreesWithLock(lock, { packages: { ...installed, 'node_modules/a': other } })).toBe(false);
    expect(agreesWithLock(lock, { packages: { ...installed, 'node_modules/c': entry('1.0.0') } })).toBe(false);
  });
  test('is false when nothing was installed', () => {
    expect(agreesWithLock(lock, null)).toBe(false);
    expect(agreesWithLock(null, { packages: installed })).toBe(false);
  });
});
