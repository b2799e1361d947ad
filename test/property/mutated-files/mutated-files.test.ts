import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, expect, test } from 'vitest';
import { IntakeError } from '../../../lib/intake/types.ts';
import { mutate } from './mutate.ts';
import { readAsImportsDo } from './read-as-imports-do.ts';
import { SEED_FILES } from './seed-files.ts';

/** Over all layouts together. */
const FILES = 20_900;
/** No file of a few kilobytes may take longer, milliseconds, on a machine however busy. */
const LONGEST = 10_000;

const folder = mkdtempSync(join(tmpdir(), 'hungerstone-mutated-'));
const path = join(folder, 'file');
afterAll(() => rmSync(folder, { recursive: true }));

test.each(SEED_FILES)('$name is read as it is', async ({ name, bytes, mapping }) => {
  writeFileSync(path, bytes);
  expect(await readAsImportsDo({ path, name }, folder, mapping)).toBeGreaterThan(0);
});

const outcomes = { read: 0, refused: 0 };

test.each(SEED_FILES.map((seed, number) => ({ ...seed, number })))(
  '$name, however spoilt, is read or refused in words',
  async ({ name, bytes, number, mapping }) => {
    await fc.assert(
      fc.asyncProperty(fc.nat(), fc.nat(SEED_FILES.length - 1), async (seed, second) => {
        writeFileSync(path, mutate(bytes, seed, SEED_FILES[second].bytes));
        const begun = performance.now();
        try {
          expect(await readAsImportsDo({ path, name }, folder, mapping)).toBeGreaterThan(0);
          outcomes.read++;
        } catch (error) {
          if (!(error instanceof IntakeError)) throw error;
          // A refusal names the file and says what would do.
          expect(error.problem.file).not.toBe('');
          expect(error.problem.message).not.toMatch(/\[object|ENOENT|EACCES/);
          expect(error.problem.remedy).toMatch(/\S/);
          outcomes.refused++;
        }
        expect(performance.now() - begun).toBeLessThan(LONGEST);
      }),
      { numRuns: Math.ceil(FILES / SEED_FILES.length), seed: 1921 + number, endOnFailure: false },
    );
  },
  120_000,
);

test('both happened, and often', () => {
  expect(outcomes.read + outcomes.refused).toBeGreaterThanOrEqual(20_000);
  expect(Math.min(outcomes.read, outcomes.refused)).toBeGreaterThan(2_000);
});
