import { expect, test } from 'vitest';
import { alternativesOf } from '../../../lib/jobs/alternatives.ts';
import type { LaneProgress } from '../../../lib/jobs/lanes.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { regionStartEndOf } from '../../../lib/jobs/region-start-end.ts';
import { importedRegion } from '../api/imported-region.ts';

const place = importedRegion();

test('alternativesOf: cancelled it ends, asked again it tells where it stands to the end, and then is kept', async () => {
  const { region } = place;
  const cancel = new AbortController();
  const cancelled = alternativesOf(region, region.basis, {
    signal: cancel.signal,
    onProgress: ({ done }) => done === 2 && cancel.abort(),
  });
  await expect(cancelled).rejects.toMatchObject({ name: 'AbortError' });
  const seen: LaneProgress[] = [];
  const answer = await alternativesOf(region, region.basis, { onProgress: (progress) => seen.push(progress) });
  expect(seen.length).toBe(answer.length);
  expect(seen.at(-1)).toEqual({ stage: 'alternatives', done: answer.length, of: answer.length, share: 1 });
  const again: LaneProgress[] = [];
  expect(await alternativesOf(region, region.basis, { onProgress: (progress) => again.push(progress) })).toBe(answer);
  expect(again).toEqual([]);
});

test('alternativesOf: a choice that contradicts the basis is told and keeps no other from its answer', async () => {
  const { region } = place;
  const basis = { ...region.basis, yearStart: 11, season: [11, 4] as [number, number] };
  const answer = await alternativesOf(region, basis);
  const january = answer.find(({ label }) => label.startsWith('calendar'))!;
  expect(january.problem).toContain('runs over the end of a low-flow year');
  expect(answer.filter(({ problem }) => problem === null).length).toBeGreaterThan(10);
});

test('regionStartEndOf: cancelled before it begins it computes nothing', async () => {
  const { region } = place;
  const ranked = await rankingOf(region, { ...region.basis, alpha: 0.2 });
  const signal = AbortSignal.abort();
  await expect(regionStartEndOf(ranked, { signal })).rejects.toMatchObject({ name: 'AbortError' });
  expect((await regionStartEndOf(ranked)).stations.some((count) => count > 0)).toBe(true);
});
