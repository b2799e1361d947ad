import { inProject } from '../paths.js';
import { prepare } from '../prepare.js';
import { runNode } from '../run.js';

/** `npm run bench`: times and sizes, printed and never asserted. Words given to it choose files. */
export async function task(argv) {
  await prepare();
  return runNode([inProject('node_modules/vitest/vitest.mjs'), 'run', '--project', 'bench', ...argv], {
    stdout: 'inherit',
    env: { NODE_ENV: 'production', HUNGERSTONE_BENCH: '1' },
  });
}
