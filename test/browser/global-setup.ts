import type { TestProject } from 'vitest/node';
import { startTrial } from '../../lib/cli/setup/trial.js';

declare module 'vitest' {
  interface ProvidedContext {
    /** address of a production server whose database holds the demo region */
    serverUrl: string;
  }
}

/** One server for all browser tests. While writing tests, HUNGERSTONE_TEST_SERVER names one that runs already. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env.HUNGERSTONE_TEST_SERVER;
  if (given) {
    project.provide('serverUrl', given);
    return async () => {};
  }
  const trial = await startTrial();
  project.provide('serverUrl', trial.url);
  return async () => {
    await trial.stop();
  };
}
