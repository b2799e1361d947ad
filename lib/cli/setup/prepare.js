import process from 'node:process';
import { bundle, isBundled } from './bundle.js';
import { generate, isGenerated } from './generate.js';
import { install, isInstalled } from './install.js';
import { withLock } from './lock.js';
import { inProject } from './paths.js';

const STEPS = [
  { done: isInstalled, work: install },
  { done: isGenerated, work: generate },
  { done: isBundled, work: bundle },
];

/** Brings packages, database client and bundles up to date; each step only when it is not. Two at once take turns.
 *  HUNGERSTONE_AS_BUILT: a test's second server must not rebuild what the first one is running from. */
export async function prepare() {
  if (process.env.HUNGERSTONE_AS_BUILT) return;
  if (STEPS.every((step) => step.done())) return;
  await withLock(inProject('.build', 'setup.lock'), 'set-up', async () => {
    for (const step of STEPS) if (!step.done()) await step.work();
  });
}
