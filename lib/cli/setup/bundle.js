import { existsSync, mkdirSync, renameSync, writeFileSync } from 'node:fs';
import { basename } from 'node:path';
import process from 'node:process';
import { inProject, ROOT } from './paths.js';
import { SetupError } from './say.js';
import { hashOf, readStamp, writeStamp } from './stamp.js';

/** Packages stay outside of a bundle. */
const LEAN = { packages: 'external' };

/** Packages go in, but for those with native parts: such a bundle loads in half the time. Some of them are not modules yet
 *  and ask for require. */
const WHOLE = {
  external: ['libsql'],
  banner: { js: "import { createRequire } from 'node:module'; const require = createRequire(import.meta.url);" },
};

/** What Node runs outside Next: the batch commands, the workers, which must start quickly, the demo's maker. */
const BUNDLES = {
  'cli.mjs': { entry: 'lib/cli/main.ts', how: LEAN },
  'worker.mjs': { entry: 'lib/jobs/worker.ts', how: WHOLE },
  'seed.mjs': { entry: 'seed/cli.ts', how: LEAN },
};

const STAMP = inProject('.build', 'bundles.json');
const sourceHash = () =>
  hashOf(ROOT, ['lib', 'seed', 'tsconfig.json', 'package-lock.json'], (name) => name === 'lib/cli/setup');

/** True when the bundles were made from the present sources. */
export function isBundled() {
  const names = Object.keys(BUNDLES);
  return names.every((name) => existsSync(inProject('.build', name))) && readStamp(STAMP)?.sources === sourceHash();
}

/** Bundles the TypeScript entries to .build/*.mjs; the generated database client goes in. */
export async function bundle() {
  const sources = sourceHash();
  const { build } = await import('esbuild');
  mkdirSync(inProject('.build'), { recursive: true });
  for (const [name, { entry, how }] of Object.entries(BUNDLES)) {
    await bundleOne(build, name, entry, how);
  }
  writeStamp(STAMP, { sources });
}

async function bundleOne(build, name, entry, how) {
  const outfile = inProject('.build', name);
  let result;
  try {
    result = await build({
      absWorkingDir: ROOT,
      entryPoints: [entry],
      outfile,
      bundle: true,
      write: false,
      platform: 'node',
      format: 'esm',
      target: 'node20',
      ...how,
      sourcemap: 'linked',
      logLevel: 'silent',
    });
  } catch (error) {
    throw new SetupError(`${entry} could not be bundled: ${error.message}`);
  }
  // A worker that starts just now must find the old file or the new one, never half of one.
  for (const file of result.outputFiles) {
    const half = inProject('.build', `${basename(file.path)}.${process.pid}`);
    writeFileSync(half, file.contents);
    renameSync(half, file.path);
  }
}
