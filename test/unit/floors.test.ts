import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, posix, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** Floors from the ground up. A file imports from floors below its own, and from its own folder. A neighbour on the same
 *  floor may lend its types, which are gone when the program runs, and nothing else. */
const FLOORS = [
  ['lib/calendar'],
  ['lib/series', 'lib/statistics'],
  ['lib/lowflow', 'lib/curves', 'lib/checks'],
  ['lib/region'],
  ['lib/store', 'lib/intake'],
  ['lib/jobs', 'lib/export'],
  ['lib/cli', 'app', 'seed', 'instrumentation.ts'],
];

/** Numbers in, numbers out: the same in a worker, in a test and in a browser. */
const PURE = [
  ...['lib/calendar', 'lib/series', 'lib/statistics', 'lib/lowflow', 'lib/curves', 'lib/checks', 'lib/region'],
];

/** Packages that a pure folder may use: none of them reads, writes, waits or draws lots by itself. */
const PURE_PACKAGES = /^(@stdlib\/|d3-array$|pure-rand(\/|$))/;

const DATABASE_PACKAGES = /^(@prisma\/|@libsql\/|libsql(\/|$))/;

const IMPURE_WORDS = /\b(Date\.now|new Date\(\)|Math\.random|performance\.now|process\.|globalThis|console\.)/;

/** Words of rivers: statistics is for any numbers. */
const RIVER_WORDS = /\b(flow|flows|river|rivers|streams?|discharge|gauges?|catchments?|low-flow|hydrolog\w*)\b/i;

interface Source {
  path: string;
  text: string;
  /** project paths and package names */
  imports: string[];
  /** those of them that bring in nothing but types */
  typeImports: string[];
}

/** What a file's text imports, type imports and dynamic ones included; comments are not read. */
function importsOf(path: string, text: string): { name: string; isType: boolean }[] {
  const code = text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/^\s*\/\/.*$/gm, '');
  const statement =
    /^\s*(?:import|export)\s+(type\s)?[^;'"]*?\bfrom\s*['"]([^'"]+)['"]|\bimport\s*\(?\s*['"]([^'"]+)['"]/gm;
  return [...code.matchAll(statement)].map(([, type, from, bare]) => {
    const name = from ?? bare;
    const isType = type !== undefined;
    if (name.startsWith('@/')) return { name: name.slice(2), isType };
    return { name: name.startsWith('.') ? posix.join(posix.dirname(path), name) : name, isType };
  });
}

function sourcesBelow(folder: string): Source[] {
  return readdirSync(join(ROOT, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|tsx|js|mjs)$/.test(entry.name))
    .map((entry) => relative(ROOT, join(entry.parentPath, entry.name)).replaceAll('\\', '/'))
    .filter((path) => !path.startsWith('lib/store/generated/'))
    .map((path) => readSource(path));
}

function readSource(path: string): Source {
  const text = readFileSync(join(ROOT, path), 'utf8');
  const found = importsOf(path, text);
  const valueNames = new Set(found.filter(({ isType }) => !isType).map(({ name }) => name));
  const imports = [...new Set(found.map(({ name }) => name))];
  return { path, text, imports, typeImports: imports.filter((name) => !valueNames.has(name)) };
}

const isIn = (path: string, folder: string): boolean => path === folder || path.startsWith(`${folder}/`);
const folderOf = (path: string): string | undefined => FLOORS.flat().find((folder) => isIn(path, folder));
const floorOf = (folder: string): number => FLOORS.findIndex((floor) => floor.includes(folder));
const isProjectPath = (name: string): boolean => /^(app|lib|seed|test|prisma)\//.test(name);

/** "from → to" for every import that climbs, or goes sideways to another folder for more than types. */
function climbing(sources: Source[]): string[] {
  return sources.flatMap(({ path, imports, typeImports }) => {
    const own = folderOf(path);
    return imports.filter(isProjectPath).flatMap((name) => {
      if (/^lib\/basis(\.ts)?$/.test(name)) return [];
      const other = folderOf(name);
      if (own === undefined || other === undefined) return [`${path} → ${name} (on no floor)`];
      if (other === own || floorOf(other) < floorOf(own)) return [];
      return floorOf(other) === floorOf(own) && typeImports.includes(name) ? [] : [`${path} → ${name}`];
    });
  });
}

const SOURCES = [...['app', 'lib', 'seed'].flatMap(sourcesBelow), readSource('instrumentation.ts')];
const inFolders = (folders: string[]): Source[] =>
  SOURCES.filter(({ path }) => folders.some((folder) => isIn(path, folder)));

describe('the walk itself', () => {
  test('importsOf finds static, type, dynamic, bare and aliased imports and re-exports, and no comment', () => {
    const text = `
      import a from './a.ts';
      import type { B } from "../store/b.ts";
      import 'leaflet/dist/leaflet.css';
      export { c } from '@/lib/jobs/c';
      const d = await import('node:fs');
      type E = import('../region/e.ts').E;
      // import f from './f.ts';
      /* import g from './g.ts'; */
      import {
        h,
      } from './h.ts';
      import { type I, i } from './i.ts';
      export type { J } from './j.ts';`;
    expect(importsOf('lib/curves/x.ts', text).map(({ name, isType }) => (isType ? `type ${name}` : name))).toEqual([
      'lib/curves/a.ts',
      'type lib/store/b.ts',
      'leaflet/dist/leaflet.css',
      'lib/jobs/c',
      'node:fs',
      'lib/region/e.ts',
      'lib/curves/h.ts',
      'lib/curves/i.ts',
      'type lib/curves/j.ts',
    ]);
  });
  test('climbing names an import from above and one from the side, and lets those from below and inside be', () => {
    const source = (path: string, ...imports: string[]): Source => ({ path, text: '', imports, typeImports: [] });
    expect(
      climbing([
        source('lib/series/a.ts', 'lib/calendar/b.ts', 'lib/series/c.ts', 'lib/basis.ts', 'd3-array'),
        source('lib/series/d.ts', 'lib/statistics/e.ts'),
        { ...source('lib/series/types.ts', 'lib/statistics/e.ts'), typeImports: ['lib/statistics/e.ts'] },
        source('lib/calendar/f.ts', 'app/page.tsx'),
        { ...source('lib/calendar/types.ts', 'lib/series/a.ts'), typeImports: ['lib/series/a.ts'] },
        source('lib/region/g.ts', 'test/h.ts'),
      ]),
    ).toEqual([
      'lib/series/d.ts → lib/statistics/e.ts',
      'lib/calendar/f.ts → app/page.tsx',
      'lib/calendar/types.ts → lib/series/a.ts',
      'lib/region/g.ts → test/h.ts (on no floor)',
    ]);
  });
  test('every floor has files, so that nothing is passed for want of looking', () => {
    for (const folder of FLOORS.flat()) expect(inFolders([folder]), folder).not.toEqual([]);
  });
});

test('every folder of lib stands on a floor', () => {
  const folders = readdirSync(join(ROOT, 'lib'), { withFileTypes: true }).filter((entry) => entry.isDirectory());
  expect(folders.map((entry) => `lib/${entry.name}`).filter((folder) => !FLOORS.flat().includes(folder))).toEqual([]);
});

test('files import only from floors below their own', () => {
  expect(climbing(SOURCES)).toEqual([]);
});

test('only lib/store speaks to the database', () => {
  const others = SOURCES.filter(({ path }) => !isIn(path, 'lib/store'));
  const hits = others.flatMap(({ path, imports }) =>
    imports
      .filter((name) => DATABASE_PACKAGES.test(name) || isIn(name, 'lib/store/generated'))
      .map((name) => `${path} → ${name}`),
  );
  expect(hits).toEqual([]);
});

test('the pure folders import no Node, React, database or other package that does anything by itself', () => {
  const hits = inFolders(PURE).flatMap(({ path, imports }) =>
    imports.filter((name) => !isProjectPath(name) && !PURE_PACKAGES.test(name)).map((name) => `${path} → ${name}`),
  );
  expect(hits).toEqual([]);
});

test('the pure folders read no clock, no lots, no surroundings', () => {
  const hits = inFolders(PURE).flatMap(({ path, text }) => {
    const code = text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');
    const word = IMPURE_WORDS.exec(code);
    return word ? [`${path}: ${word[0]}`] : [];
  });
  expect(hits).toEqual([]);
});

test('statistics has no word of rivers in its code', () => {
  const hits = inFolders(['lib/statistics']).flatMap(({ path, text }) => {
    const code = text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');
    const word = RIVER_WORDS.exec(code);
    return word ? [`${path}: ${word[0]}`] : [];
  });
  expect(hits).toEqual([]);
});

test('what the set-up runs before the packages are there imports nothing but node: and its own folder', () => {
  const setUp = SOURCES.filter(({ path }) => isIn(path, 'lib/cli/setup') || path === 'lib/cli/hungerstone.js');
  const early = setUp.flatMap(({ path, text }) =>
    [...text.matchAll(/^(?:import|export)\b[^;]*?\bfrom\s*'([^']+)'/gm)]
      .map((match) => match[1])
      .filter((name) => !name.startsWith('node:') && !posix.join(dirname(path), name).startsWith('lib/cli/setup/'))
      .map((name) => `${path} → ${name}`),
  );
  expect(setUp.length).toBeGreaterThan(5);
  expect(early).toEqual([]);
});
