import { existsSync } from 'node:fs';
import process from 'node:process';
import { withLock } from './lock.js';
import { inProject, ROOT } from './paths.js';
import { runNode } from './run.js';
import { SetupError, say } from './say.js';
import { hashOf, readStamp, writeStamp } from './stamp.js';

/** What a production build is made from. The batch commands are no part of the site. */
const sourceHash = () =>
  hashOf(
    ROOT,
    ['app', 'lib', 'instrumentation.ts', 'next.config.js', 'tsconfig.json', 'package-lock.json'],
    (name) => name.startsWith('lib/cli/') || /\.md$/.test(name),
  );

const stampOf = (dist) => inProject(dist, 'hungerstone.json');

/** True when the production build in `dist` was made from the present sources. */
export function isBuilt(dist) {
  return existsSync(inProject(dist, 'BUILD_ID')) && readStamp(stampOf(dist))?.sources === sourceHash();
}

/** Builds the site into `dist`, a folder name in the project's root, unless that build is there already. */
export async function ensureBuilt(dist) {
  if (process.env.HUNGERSTONE_AS_BUILT || isBuilt(dist)) return;
  await withLock(inProject('.build', `build-${dist.replace(/\W/g, '_')}.lock`), 'build', async () => {
    if (isBuilt(dist)) return;
    say('Building the site …');
    const sources = sourceHash();
    const code = await runNode([inProject('node_modules/next/dist/bin/next'), 'build'], {
      quiet: true,
      env: { NEXT_DIST: dist, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
    });
    if (code !== 0) throw new SetupError(`The site could not be built (next build ended with ${code}).`);
    writeStamp(stampOf(dist), { sources });
  });
}
