import { build } from 'esbuild';
import { expect, test } from 'vitest';

/** Loading Prisma costs a worker more time than everything else together. */
const TOO_HEAVY = /prisma|^next|^react/;

test('the workers load neither Prisma nor anything of the screens', async () => {
  const { metafile } = await build({
    ...{ entryPoints: ['lib/jobs/worker.ts'], bundle: true, write: false, metafile: true, logLevel: 'error' },
    ...{ platform: 'node', format: 'esm', packages: 'external' },
  });
  const loaded = Object.values(metafile.inputs).flatMap(({ imports }) => imports.map(({ path }) => path));
  expect(loaded.length).toBeGreaterThan(50);
  expect([...new Set(loaded)].filter((path) => TOO_HEAVY.test(path))).toEqual([]);
});
