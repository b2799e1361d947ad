import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, inject, test, vi } from 'vitest';

// Every route that the production build has, by the build's own list: a new one without a line here fails.

const serverUrl = inject('serverUrl');
const MANIFEST = new URL('../../.next-test/app-path-routes-manifest.json', import.meta.url);
const ROUTES = Object.values(JSON.parse(readFileSync(MANIFEST, 'utf8')) as Record<string, string>).filter(
  (route) => !route.startsWith('/_'),
);

/** What stands in the brackets of a route; filled from the demo region and from one import. */
const VALUES: Record<string, string> = {};
/** Routes that answer about the import; the rest asks about the demo region. */
const OF_THE_IMPORT = /\[import\]|\[job\]/;

/** What a route needs beside its path. */
const QUERIES: Record<string, string> = { '/map-outline': '?box=-10,40,10,60' };

let importRegion: string;

const getJson = async (path: string) => (await fetch(serverUrl + path)).json();

beforeAll(async () => {
  const regions = (await getJson('/api/regions')) as { slug: string; invented: boolean }[];
  const [demo] = regions.filter(({ invented }) => invented);
  VALUES.region = demo.slug;
  const stations = await getJson(`/api/regions/${demo.slug}/stations`);
  VALUES.code = stations.features[0].properties.station_code;
  VALUES.layer = String((await getJson(`/api/regions/${demo.slug}/layers`))[0].id);

  const made = await fetch(`${serverUrl}/api/regions`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ name: `Routes ${Date.now()}` }),
  });
  importRegion = (await made.json()).slug;
  const form = new FormData();
  form.set(
    'file',
    new Blob(['station,date,flow\nA,2001-05-01,1.5\nA,2001-05-02,wet\nA,2001-05-03,1.25\n']),
    'flows.csv',
  );
  form.set('choices', JSON.stringify({ all: { unit: 'm3/s' } }));
  const sent = await fetch(`${serverUrl}/api/regions/${importRegion}/imports`, { method: 'POST', body: form });
  expect(sent.status, await sent.clone().text()).toBe(202);
  VALUES.job = (await sent.json()).id;
  const finished = async () => expect((await getJson(`/api/jobs/${VALUES.job}`)).state).toBe('done');
  await vi.waitFor(finished, { timeout: 20_000, interval: 100 });
  VALUES.import = String((await getJson(`/api/regions/${importRegion}/imports`))[0].id);
});

afterAll(async () => {
  await fetch(`${serverUrl}/api/regions/${importRegion}`, { method: 'DELETE' });
});

test('the build has the routes that are promised to other programs', () => {
  expect(ROUTES).toEqual(
    expect.arrayContaining([
      '/',
      '/healthz',
      '/api/openapi.json',
      '/api/regions',
      '/api/regions/[region]/stations',
      '/api/regions/[region]/ranking',
      '/api/regions/[region]/minima',
      '/api/regions/[region]/curves',
      '/api/regions/[region]/imports',
      '/api/jobs/[job]',
      '/api/jobs/[job]/events',
    ]),
  );
});

describe('answers 200', () => {
  test.each(ROUTES)('%s', async (route) => {
    const values = OF_THE_IMPORT.test(route) ? { ...VALUES, region: importRegion } : VALUES;
    const path = route.replace(/\[(\w+)\]/g, (_, name: string) => {
      expect(values[name], `a value for [${name}] of ${route}`).toEqual(expect.stringMatching(/^(?!undefined)./));
      return encodeURIComponent(values[name]);
    });
    const answer = await fetch(serverUrl + path + (QUERIES[route] ?? ''), { signal: AbortSignal.timeout(30_000) });
    const text = await answer.text();
    expect(answer.status, text.slice(0, 300)).toBe(200);
    expect(text.length).toBeGreaterThan(0);
  });
});
