import { afterAll, expect, test, vi } from 'vitest';
import { GET as regionBreaks } from '../../../app/api/regions/[region]/breaks/route.ts';
import { GET as certainty } from '../../../app/api/regions/[region]/certainty/route.ts';
import { GET as ranking } from '../../../app/api/regions/[region]/ranking/route.ts';
import { GET as regional } from '../../../app/api/regions/[region]/regional/route.ts';
import { GET as regionStartEnd } from '../../../app/api/regions/[region]/start-end/route.ts';
import { GET as breaks } from '../../../app/api/regions/[region]/stations/[code]/breaks/route.ts';
import { GET as pair } from '../../../app/api/regions/[region]/stations/[code]/pair/route.ts';
import { GET as startEnd } from '../../../app/api/regions/[region]/stations/[code]/start-end/route.ts';
import { GET as weather } from '../../../app/api/regions/[region]/stations/[code]/weather/route.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { call } from '../api/call.ts';
import { CODES, inShuffledRegion } from './shuffled-region.ts';

/** How the work is shared out: stations a task at most, and tasks that are done side by side. */
const division = vi.hoisted(() => ({ most: Number.POSITIVE_INFINITY, lanes: 2 }));

vi.mock('../../../lib/jobs/share-out.ts', async (original) => {
  const real = await original<typeof import('../../../lib/jobs/share-out.ts')>();
  const chunksOf: typeof real.chunksOf = (items, size = real.STATIONS_PER_TASK) =>
    real.chunksOf(items, Math.min(size, division.most));
  return { ...real, chunksOf };
});
vi.mock('../../../lib/jobs/pool.ts', async (original) => {
  const real = await original<typeof import('../../../lib/jobs/pool.ts')>();
  return Object.defineProperty({ ...real }, 'THREADS', { get: () => division.lanes });
});

afterAll(closePool);

const REGION = { region: 'upper-wethe' };

/** An answer as text, without the notes on where it comes from. */
async function textOf(response: Response): Promise<string> {
  const text = await response.text();
  expect(response.status, text).toBe(200);
  if (!response.headers.get('content-type')?.includes('json')) return text;
  // the hash of the data speaks of the station's numbers too
  const { dataHash: _, generatedAt: __, ...answer } = JSON.parse(text);
  return JSON.stringify(answer);
}

/** Everything that is inferred from a region under a basis, by what was asked. */
async function inferences(basis: string): Promise<Record<string, string>> {
  const asked = `format=csv&${basis}`;
  const ofRegion = (route: string, rest = '') => `/api/regions/upper-wethe/${route}?${asked}${rest}`;
  const ofStation = (code: string, route: string, rest: string) =>
    `/api/regions/upper-wethe/stations/${code}/${route}?${basis}${rest}`;
  const of = (code: string) => ({ ...REGION, code });
  const answers: Record<string, () => Promise<Response>> = {
    ranking: () => call(ranking, ofRegion('ranking', '&k=3'), REGION),
    certainty: () => call(certainty, ofRegion('certainty'), REGION),
    permutation: () => call(regional, ofRegion('regional'), REGION),
    sieve: () => call(regional, ofRegion('regional', '&method=sieve'), REGION),
    'start–end of the region': () => call(regionStartEnd, ofRegion('start-end'), REGION),
    'breaks of the region': () => call(regionBreaks, ofRegion('breaks', '&breaks=changes,2000'), REGION),
    'start–end': () => call(startEnd, ofStation('P4', 'start-end', '&format=csv'), of('P4')),
    'start–end of days': () => call(startEnd, ofStation('DRY', 'start-end', '&format=csv'), of('DRY')),
    breaks: () => call(breaks, ofStation('P3', 'breaks', '&breaks=changes'), of('P3')),
    pair: () => call(pair, ofStation('P2', 'pair', '&with=P1'), of('P2')),
    weather: () => call(weather, ofStation('P3', 'weather', ''), of('P3')),
  };
  const texts: Record<string, string> = {};
  for (const [what, ask] of Object.entries(answers)) texts[what] = await textOf(await ask());
  return texts;
}

async function tried(order: readonly string[], second: boolean) {
  return inShuffledRegion(order, second, async (region) => ({
    ids: (await listStations(region.id)).map(({ id }) => id),
    usual: await inferences(''),
    resampled: await inferences('serialCorrection=block-bootstrap&rankBy=kendall-tau&alpha=0.001'),
  }));
}

test('what is inferred depends neither on the order in which stations came nor on how the work is shared out', async () => {
  const { ids, ...one } = await tried(CODES, false);
  Object.assign(division, { most: 3, lanes: 1 });
  const { ids: otherIds, ...other } = await tried(CODES.toReversed(), true);
  expect(otherIds).not.toEqual(ids);
  for (const basis of ['usual', 'resampled'] as const) {
    for (const [what, text] of Object.entries(one[basis])) {
      expect(text.length, what).toBeGreaterThan(200);
      expect(other[basis][what], `${what}, ${basis}`).toBe(text);
    }
  }
  // draws were made: spans, chances and detectable trends are there
  expect(one.usual.certainty.split('\n')[1]).toMatch(/^P\d+,\d+,\d+,5,[\d.]+,[\d.]+,[\d.]+/);
  expect(one.usual.breaks).toContain('"pBySieve":true');
  expect(one.resampled.pair).toMatch(/"detectable_percent_per_decade":\d/);
  expect(one.resampled.weather).toMatch(/"detectable_percent_per_decade":\d/);
}, 180_000);
