import { statSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { licenceList } from '../../../../lib/cli/setup/checks/licences.js';
import { scriptsOf } from '../../../../lib/cli/setup/checks/script-size.js';
import { committedFiles, lockProblem, treeProblems } from '../../../../lib/cli/setup/checks/tree.js';

const BIN = { mode: '100755', path: 'lib/cli/hungerstone.js' };

describe('treeProblems', () => {
  test('finds nothing wrong with the planned entries and dot-files', () => {
    expect(treeProblems([BIN, { mode: '100644', path: 'app/page.tsx' }, { mode: '100755', path: '.ci/run' }])).toEqual(
      [],
    );
  });
  test('names an entry that has no place in the root', () => {
    const problems = treeProblems([
      BIN,
      { mode: '100644', path: 'scripts/x.sh' },
      { mode: '100644', path: 'notes.txt' },
    ]);
    expect(problems).toEqual(["the project's root has no place for scripts, notes.txt"]);
  });
  test('wants the bin to be executable, for npx passes it over otherwise', () => {
    expect(treeProblems([{ ...BIN, mode: '100644' }])).toHaveLength(1);
    expect(treeProblems([])).toHaveLength(1);
  });
});

test('the bin is committed as executable; outside a git checkout, it is so on the disk', () => {
  const committed = committedFiles()?.find((file: { path: string }) => file.path === BIN.path)?.mode;
  const onDisk = (statSync(new URL(`../../../../${BIN.path}`, import.meta.url)).mode & 0o100) !== 0;
  expect(committed ?? (onDisk ? '100755' : '100644')).toBe('100755');
});

test('lockProblem names a registry in the lock', () => {
  expect(lockProblem('{"integrity": "sha512-x"}')).toBeNull();
  expect(lockProblem('"resolved": "https://npm.example/a.tgz"')).toContain('https://npm.example');
});

describe('licenceList', () => {
  const lock = (packages: object) => ({ packages: { '': {}, ...packages } });
  test('lists each installed package once, nested ones by their own name, tools left out', () => {
    const list = licenceList(
      lock({
        'node_modules/b': { version: '1.0.0', license: 'MIT' },
        'node_modules/c/node_modules/b': { version: '1.0.0', license: 'MIT' },
        'node_modules/c/node_modules/@s/a': { version: '2.0.0', license: 'ISC' },
        'node_modules/tool': { version: '1.0.0', license: 'MIT', dev: true },
      }),
    );
    expect(list.split('\n\n').at(-1)).toBe('@s/a 2.0.0: ISC\nb 1.0.0: MIT\n');
  });
  test('refuses a package without a licence by name', () => {
    expect(() => licenceList(lock({ 'node_modules/x': { version: '3.0.0' } }))).toThrow('x 3.0.0 names no licence');
  });
});

test('scriptsOf finds what a browser loads, once, and leaves scripts for old browsers', () => {
  const html = `<script src="/a.js" async=""></script><script src="/a.js"></script><script>inline()</script>
    <link rel="preload" as="script" href="/b.js"/><link rel="modulepreload" href="/c.js"/>
    <link rel="stylesheet" href="/d.css"/><script src="/old.js" noModule=""></script>`;
  expect(scriptsOf(html)).toEqual(['/a.js', '/b.js', '/c.js']);
});
