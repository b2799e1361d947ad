import { expect, test, vi } from 'vitest';
import { keptResult } from '../../../lib/jobs/cached.ts';
import { regionalKey, regionalOf } from '../../../lib/jobs/regional.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importedRegion } from '../api/imported-region.ts';

/** What happens right after a ranking was read, and under which keys rankings were read. */
const after = vi.hoisted(() => ({ ranking: async () => {}, keys: [] as string[] }));

vi.mock('../../../lib/jobs/ranking.ts', async (original) => {
  const real = await original<typeof import('../../../lib/jobs/ranking.ts')>();
  const rankingOf: typeof real.rankingOf = async (region, basis) => {
    const ranked = await real.rankingOf(region, basis);
    after.keys.push(ranked.key);
    await after.ranking();
    return ranked;
  };
  return { ...real, rankingOf };
});

const place = importedRegion();

test('regionalOf begins anew when a record changes after the ranking was read, and keeps nothing of the mixture', async () => {
  const { region } = place;
  const station = (await listStations(region.id)).find(({ code }) => code === 'A1')!;
  after.ranking = async () => {
    after.ranking = async () => {};
    await addMark({ stationId: station.id, kind: 'reject', firstDay: 4000, lastDay: 14000, reason: 'a boot' });
  };
  const question = { method: 'permutation', area: null } as const;
  const answers = await regionalOf(region, region.basis, question);
  const [before, now] = after.keys;
  expect(now).not.toBe(before);
  expect(keptResult('regional', regionalKey(before, question))).toBeNull();
  expect(keptResult('regional', regionalKey(now, question))?.value).toEqual(answers);
  // A1 has too few usable years now
  expect(answers.groups[0].codes).not.toContain('A1');
});
