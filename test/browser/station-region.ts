import { expect, vi } from 'vitest';
import { fetchJson, newRegion } from './demo-region.ts';
import { serverUrl } from './harness.ts';

/** A region of two stations on one river, 07 above 08, with six years of flows each, for tests that change stations. */
export async function editableRegion(name: string): Promise<string> {
  const slug = await newRegion(name);
  const rows = ['station,date,flow_m3s'];
  for (const [code, share] of [
    ['07', 1],
    ['08', 2],
  ] as const) {
    for (let day = 0; day < 6 * 365; day++) {
      const date = new Date(Date.UTC(2001, 0, 1 + day)).toISOString().slice(0, 10);
      rows.push(`${code},${date},${(share * (3 + 2 * Math.cos(day / 58))).toFixed(3)}`);
    }
  }
  const registry =
    'code,name,river,latitude,longitude,area_km2\n07,Weir at Ford,Weir,46.1,14.1,120\n08,Weir at Mill,Weir,46.1,14.3,260\n';
  const form = new FormData();
  form.append('file', new Blob([registry]), 'stations.csv');
  form.append('file', new Blob([rows.join('\n')]), 'flows.csv');
  form.append('choices', JSON.stringify({ all: { unit: 'm3/s' } }));
  const sent = await fetch(`${serverUrl}/api/regions/${slug}/imports`, { method: 'POST', body: form });
  expect(sent.status, await sent.clone().text()).toBe(202);
  const { id } = (await sent.json()) as { id: string };
  const done = async () => expect(await fetchJson(`/api/jobs/${id}`)).toMatchObject({ state: 'done' });
  await vi.waitFor(done, { timeout: 30_000, interval: 200 });
  return slug;
}
