import { expect, test } from 'vitest';
import { GET as regional } from '../../../app/api/regions/[region]/regional/route.ts';
import { DEFAULT_BASIS } from '../../../lib/basis.ts';
import { forgetResults, settleResults } from '../../../lib/jobs/cached.ts';
import { chanceOf } from '../../../lib/jobs/chance.ts';
import type { LaneProgress } from '../../../lib/jobs/lanes.ts';
import { viewJob } from '../../../lib/jobs/live-jobs.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import type { RegionalAnswers } from '../../../lib/region/regional-types.ts';
import { listRegions } from '../../../lib/store/regions.ts';
import { seeded } from '../../seeded.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call } from './call.ts';

temporaryDatabase();

const STATIONS = 205;
const DAYS = 22 * 366;

/** More stations than are answered at once: short records, one level a year. */
async function largeRegion(): Promise<{ slug: string; id: number }> {
  const random = seeded(4);
  const parts = Array.from({ length: STATIONS }, (_, i) => {
    const levels = Array.from({ length: 24 }, () => 1 + random());
    const values = Array.from({ length: DAYS }, (_, day) => levels[Math.floor(day / 365.25)] + (day % 9) / 100);
    return { code: `S${String(i).padStart(3, '0')}`, values };
  });
  await importFiles([parts]);
  const [{ slug, id }] = await listRegions();
  return { slug, id };
}

test('GET regional of a large region answers a job, then the answers, and another area at once', async () => {
  const { slug, id } = await largeRegion();
  const ask = (query = '') => call(regional, `/api/regions/${slug}/regional?yearStart=1${query}`, { region: slug });
  const first = await ask();
  expect(first.status).toBe(202);
  const { job } = (await first.json()) as { job: string };
  await expect.poll(async () => (await viewJob(job))?.state, { timeout: 30_000 }).toBe('done');
  expect((await viewJob(job))?.progress).toMatchObject({ stage: 'chance', share: 1 });

  const answered = await ask();
  expect(answered.status).toBe(200);
  const answers = (await answered.json()) as RegionalAnswers;
  expect(answers.groups[0].ranked).toBe(STATIONS);
  const drawn = await ask('&area=0,0;1,0;1,1');
  expect(drawn.status).toBe(200);
  expect(((await drawn.json()) as RegionalAnswers).groups.at(-1)).toMatchObject({ id: 'drawn', ranked: 0 });

  // the same from nothing, in pieces that end in another order
  const { ranking } = await rankingOf({ id }, { ...DEFAULT_BASIS, yearStart: 1 });
  const [one, other] = [await chanceOf(ranking, 'one', 'permutation'), await chanceOf(ranking, 'other', 'permutation')];
  expect(one.bits).toEqual(other.bits);

  // cancelled halfway, nothing is kept of it
  const stop = new AbortController();
  const seen: LaneProgress[] = [];
  const onProgress = (progress: LaneProgress) => {
    seen.push(progress);
    stop.abort();
  };
  await expect(chanceOf(ranking, 'third', 'permutation', { signal: stop.signal, onProgress })).rejects.toThrow('abort');
  expect(seen[0].share).toBeLessThan(1);
  expect((await chanceOf(ranking, 'third', 'permutation')).bits).toEqual(one.bits);
  await settleResults();
  await forgetResults();
}, 120_000);
