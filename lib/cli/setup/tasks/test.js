import { inProject } from '../paths.js';
import { prepare } from '../prepare.js';
import { runNode } from '../run.js';

/** `npm test`: every test, or those that the words given to it choose (they go to vitest). One run, so that its summary
 *  counts everything; the browser tests' own set-up builds the site. */
export async function task(argv) {
  await prepare();
  return runNode([inProject('node_modules/vitest/vitest.mjs'), 'run', ...argv], {
    stdout: 'inherit',
    env: { NODE_ENV: 'test' },
  });
}
