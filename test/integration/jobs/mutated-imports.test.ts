import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { MessageChannel } from 'node:worker_threads';
import { expect, test } from 'vitest';
import { takeFiles } from '../../../lib/jobs/tasks/take-files.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { undoImport } from '../../../lib/store/undo-import.ts';
import { mutate } from '../../property/mutated-files/mutate.ts';
import { SEED_FILES } from '../../property/mutated-files/seed-files.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { databaseContent } from './database-content.ts';

const place = temporaryDatabase();
const PER_SEED = 20;

/** Every sign of an import that was stored in part. */
function halfWritten(path: string): unknown[] {
  const connection = openConnection(path);
  const found = [
    "SELECT id FROM Import WHERE state <> 'applied'",
    'SELECT id FROM Part WHERE importId NOT IN (SELECT id FROM Import)',
    'SELECT id FROM Laid WHERE id NOT IN (SELECT laidId FROM Record WHERE laidId IS NOT NULL)',
    'SELECT id FROM Record WHERE (partId IS NULL) = (laidId IS NULL)',
  ].flatMap((sql) => rows(connection, sql).all([]));
  connection.close();
  return found;
}

test('spoilt files are imported whole or not at all, and an undo leaves the database as it was', async () => {
  const outcomes = { taken: 0, refused: 0 };
  for (const [number, { name, bytes, mapping }] of SEED_FILES.entries()) {
    for (let seed = 0; seed < PER_SEED; seed++) {
      const path = join(place.folder, 'given');
      writeFileSync(path, mutate(bytes, 7919 * number + seed, SEED_FILES[(number + seed) % SEED_FILES.length].bytes));
      const before = databaseContent(place.path);
      const { port1, port2 } = new MessageChannel();
      const { taken, problems } = await takeFiles({
        ...{ jobId: `mutated-${number}-${seed}`, region: { name: 'Wethe' }, registry: null },
        files: [{ path, name }],
        choices: { all: { mapping: { ...mapping, dailyMean: 0.8 }, unit: 'm3/s' } },
        ...{ progress: port2, cancelled: new Int32Array(1) },
      });
      port1.close();
      if (problems.length > 0) {
        expect(databaseContent(place.path) === before, `${name}, seed ${seed}: ${problems[0].message}`).toBe(true);
        outcomes.refused++;
        continue;
      }
      expect(halfWritten(place.path), `${name}, seed ${seed}`).toEqual([]);
      for (const { importId } of [...taken].reverse()) await undoImport(importId);
      expect(halfWritten(place.path), `${name}, seed ${seed}, undone`).toEqual([]);
      outcomes.taken++;
    }
  }
  expect(Math.min(outcomes.taken, outcomes.refused)).toBeGreaterThan(50);
}, 240_000);
