import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, inject, test, vi } from 'vitest';

// Every route that the production build has, by the build's own list: a new one without a line here fails.

const serverUrl = inject('serverUrl');
// A server that runs already was built where NEXT_DIST says.
const BUILD = process.env.NEXT_DIST ?? '.next-test';
const MANIFEST = new URL(`../../${BUILD}/app-path-routes-manifest.json`, import.meta.url);
const ROUTES = Object.values(JSON.parse(readFileSync(MANIFEST, 'utf8')) as Record<string, string>).filter(
  (route) => !route.startsWith('/_'),
);

/** What stands in the brackets of a route; filled from the demo region and from one import. */
const VALUES: Record<string, string> = {};
/** Routes that answer about the import; the rest asks about the demo region. */
const OF_THE_IMPORT = /\[(import|job|upload|link|mapping|mark)\]/;

type Described = Record<string, Record<string, unknown> | undefined>;
const { paths } = (await (await fetch(`${serverUrl}/api/openapi.json`)).json()) as { paths: Described };
/** What the site's own description says that may be done at a route; null for a page. */
const methodsOf = (route: string): string[] | null => {
  const described = paths[route.replace(/\[(\w+)\]/g, '{$1}')];
  return described ? Object.keys(described).filter((key) => key !== 'parameters') : null;
};
const READ = ROUTES.filter((route) => methodsOf(route)?.includes('get') ?? true);
const CHANGED = ROUTES.filter((route) => !READ.includes(route));

/** What a route needs beside its path. */
const QUERIES: Record<string, string> = {
  '/map-outline': '?box=-10,40,10,60',
  '/api/regions/[region]/stations/[code]/days': '?first=2001-05-01&last=2001-05-03',
};

let importRegion: string;

const getJson = async (path: string) => (await fetch(serverUrl + path)).json();

/** Adds something to the import's region. @returns its id */
async function add(table: string, body: unknown): Promise<string> {
  const answer = await fetch(`${serverUrl}/api/regions/${importRegion}/${table}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  expect(answer.status, await answer.clone().text()).toBe(201);
  return String((await answer.json()).id);
}

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
    new Blob(['station,date,flow\nA,2001-05-01,1.5\nA,2001-05-02,wet\nA,2001-05-03,1.25\nB,2001-05-01,2.5\n']),
    'flows.csv',
  );
  form.set('choices', JSON.stringify({ all: { unit: 'm3/s' } }));
  const sent = await fetch(`${serverUrl}/api/regions/${importRegion}/imports`, { method: 'POST', body: form });
  expect(sent.status, await sent.clone().text()).toBe(202);
  VALUES.job = (await sent.json()).id;
  const finished = async () => expect((await getJson(`/api/jobs/${VALUES.job}`)).state).toBe('done');
  await vi.waitFor(finished, { timeout: 20_000, interval: 100 });
  VALUES.import = String((await getJson(`/api/regions/${importRegion}/imports`))[0].id);

  const upload = await fetch(`${serverUrl}/api/regions/${importRegion}/uploads`, { method: 'POST', body: form });
  expect(upload.status, await upload.clone().text()).toBe(201);
  VALUES.upload = (await upload.json()).id;
  VALUES.link = await add('links', { upstream: 'A', downstream: 'B' });
  VALUES.mapping = await add('mappings', { name: 'As before', mapping: { unit: 'm3/s' } });
  const stretch = { first: '2001-05-01', last: '2001-05-01' };
  VALUES.mark = await add('stations/A/marks', { ...stretch, kind: 'note', reason: 'weed' });
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

/** The address of a route with values in its brackets. */
function addressOf(route: string): string {
  const ofImport = OF_THE_IMPORT.test(route);
  const values = ofImport ? { ...VALUES, region: importRegion, code: 'A' } : VALUES;
  const path = route.replace(/\[(\w+)\]/g, (_, name: string) => {
    expect(values[name], `a value for [${name}] of ${route}`).toEqual(expect.stringMatching(/^(?!undefined)./));
    return encodeURIComponent(values[name]);
  });
  return serverUrl + path + (QUERIES[route] ?? '');
}

describe('answers 200', () => {
  test.each(READ)('%s', async (route) => {
    const answer = await fetch(addressOf(route), { signal: AbortSignal.timeout(30_000) });
    const text = await answer.text();
    expect(answer.status, text.slice(0, 300)).toBe(200);
    expect(text.length).toBeGreaterThan(0);
  });
});

describe('is there to change something, and refuses to be read', () => {
  test.each(CHANGED)('%s', async (route) => {
    expect(methodsOf(route)).not.toEqual([]);
    expect((await fetch(addressOf(route))).status).toBe(405);
  });
});

describe('takes away what was added', () => {
  test.each(CHANGED.filter((route) => methodsOf(route)?.includes('delete')))('%s', async (route) => {
    expect((await fetch(addressOf(route), { method: 'DELETE' })).status).toBe(204);
    expect((await fetch(addressOf(route), { method: 'DELETE' })).status).toBe(404);
  });
});
