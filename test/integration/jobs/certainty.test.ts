import { afterAll, afterEach, expect, test } from 'vitest';
import { forgetResults, keptResult } from '../../../lib/jobs/cached.ts';
import { certaintyKey, certaintyOf } from '../../../lib/jobs/certainty.ts';
import type { LaneProgress } from '../../../lib/jobs/lanes.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { certaintyTerms } from '../../../lib/jobs/tasks/certainty.ts';
import { certaintyOfRows, simulateStations } from '../../../lib/region/certainty.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { simulatedRow } from '../../../lib/region/simulated-family.ts';
import { seeded } from '../../seeded.ts';
import { basisOf, station, YEAR_START } from '../../unit/region/region-fixtures.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();
afterAll(closePool);
afterEach(forgetResults);

/** More stations than two tasks take, each with a twentieth of its years missing. */
function inventedRanking() {
  const random = seeded(41);
  const stations = Array.from({ length: 130 }, (_, i) => {
    const values = Array.from({ length: 30 }, (_, year) =>
      random() < 0.05 ? Number.NaN : 3 + random() + 0.01 * year * random(),
    );
    return station(`S${i}`, { first: 1980, values });
  });
  return rankRegion(stations, basisOf({ period: [1980, 2009] }), YEAR_START);
}

test('certaintyOf answers what one thread alone would, and tells where it stands', async () => {
  const ranking = inventedRanking();
  const told: LaneProgress[] = [];
  const certainty = await certaintyOf({ ranking, key: 'one' }, { onProgress: (progress) => told.push(progress) });
  const rows = ranking.rows.filter(({ rank }) => rank !== null).map(simulatedRow);
  const terms = certaintyTerms({ rows, basis: ranking.basis, replicates: 500 });
  expect(certainty).toEqual(certaintyOfRows(rows, simulateStations(rows, terms), terms));
  expect(told.map(({ done }) => done)).toEqual([1, 2, 3]);
  expect(told.at(-1)).toEqual({ stage: 'certainty', done: 3, of: 3, share: 1 });
  expect(keptResult('certainty', certaintyKey('one'))?.value).toEqual(certainty);
}, 60_000);

test('certaintyOf ends when it is cancelled, and keeps nothing', async () => {
  const cancel = new AbortController();
  const work = certaintyOf(
    { ranking: inventedRanking(), key: 'two' },
    { signal: cancel.signal, onProgress: () => cancel.abort() },
  );
  await expect(work).rejects.toThrow(/abort/i);
  expect(keptResult('certainty', certaintyKey('two'))).toBeNull();
});
