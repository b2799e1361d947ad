import { fileURLToPath } from 'node:url';
import { configDefaults, defineConfig } from 'vitest/config';

/** Where clocks and letters are unlike ours: a zone off by 12:45 h with summer time, a locale with a decimal comma. */
const ELSEWHERE = { TZ: 'Pacific/Chatham', LANG: 'tr_TR.UTF-8', LC_ALL: 'tr_TR.UTF-8' };
const AT_HOME = { TZ: 'UTC', LANG: 'en_US.UTF-8', LC_ALL: 'en_US.UTF-8' };

const alias = { '@': fileURLToPath(new URL('.', import.meta.url)).replace(/\/$/, '') };
const project = (name: string, test: object) => ({ resolve: { alias }, test: { name, pool: 'forks', ...test } });

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      // Pure functions need no fresh process for each file.
      project('unit', { include: ['test/unit/**/*.test.ts'], isolate: false, env: AT_HOME }),
      project('reference', { include: ['test/reference/**/*.test.ts'], isolate: false, env: AT_HOME }),
      project('property', {
        include: ['test/property/**/*.test.ts'],
        isolate: false,
        env: AT_HOME,
        testTimeout: 30_000,
      }),
      project('integration', { include: ['test/integration/**/*.test.ts'], env: AT_HOME, testTimeout: 60_000 }),
      project('elsewhere', {
        include: ['test/unit/**/*.test.ts', 'test/reference/**/*.test.ts', 'test/property/**/*.test.ts'],
        // A file that is spoilt at random is as spoilt here as there, and there are 20,000 of them. A simulation prints nothing.
        exclude: [...configDefaults.exclude, 'test/property/mutated-files/**', 'test/unit/validate/scenarios.test.ts'],
        isolate: false,
        env: ELSEWHERE,
        testTimeout: 30_000,
      }),
      // Where dates and figures become text on the way in and out; the rest of integration has none of either.
      project('elsewhere-integration', {
        include: ['test/integration/api/**/*.test.ts', 'test/integration/jobs/import*.test.ts'],
        env: ELSEWHERE,
        testTimeout: 60_000,
      }),
      project('browser', {
        include: ['test/browser/**/*.test.ts'],
        globalSetup: ['test/browser/global-setup.ts'],
        // After the others, one file at a time: timings in a browser suffer from a busy machine.
        sequence: { groupOrder: 1 },
        fileParallelism: false,
        env: AT_HOME,
        testTimeout: 60_000,
        hookTimeout: 60_000,
        // On a shared machine a page can be held up for longer than any wait: once more, and the report says so.
        retry: process.env.CI ? 1 : 0,
      }),
      // Only `npm run bench` asks for these: they print and assert nothing.
      ...(process.env.HUNGERSTONE_BENCH
        ? [project('bench', { include: ['test/bench/**/*.bench.ts'], fileParallelism: false, testTimeout: 900_000 })]
        : []),
    ],
  },
});
