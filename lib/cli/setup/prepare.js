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

/** Brings packages, database client and bundles up to date; each step only when it is not. Two at once take turns. */
export async function prepare() {
  if (STEPS.every((step) => step.done())) return;
  await withLock(inProject('.build', 'setup.lock'), 'set-up', async () => {
    for (const step of STEPS) if (!step.done()) await step.work();
  });
}
