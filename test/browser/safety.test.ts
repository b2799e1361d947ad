import { request } from 'node:http';
import { describe, expect, inject, test } from 'vitest';
import { startTrial } from '../../lib/cli/setup/trial.js';
import { hydrated, newPage } from './harness.ts';

const serverUrl = inject('serverUrl');

interface Answer {
  status: number;
  headers: Record<string, string | string[] | undefined>;
  body: string;
}

/** A request with headers that fetch would not let us set. */
function ask(path: string, { method = 'GET', headers = {}, body = '', url = serverUrl } = {}): Promise<Answer> {
  const target = new URL(url);
  return new Promise((resolve, reject) => {
    const outgoing = request(
      { host: target.hostname, port: target.port, path, method, headers: { host: target.host, ...headers } },
      (incoming) => {
        let text = '';
        incoming.setEncoding('utf8').on('data', (part) => {
          text += part;
        });
        incoming.on('end', () => resolve({ status: incoming.statusCode ?? 0, headers: incoming.headers, body: text }));
      },
    );
    outgoing.on('error', reject);
    outgoing.end(body);
  });
}

describe('the running server', () => {
  test('answers for its own names only', async () => {
    const port = new URL(serverUrl).port;
    expect((await ask('/healthz', { headers: { host: `localhost:${port}` } })).status).toBe(200);
    const rebound = await ask('/api/regions', { headers: { host: `rebound.example:${port}` } });
    expect(rebound.status).toBe(421);
    expect(rebound.headers['content-type']).toBe('application/problem+json');
    expect(rebound.body).not.toContain('slug');
  });

  test('refuses what another page sends, and nothing is changed by it', async () => {
    const body = JSON.stringify({ name: 'From elsewhere' });
    const headers = { 'content-type': 'application/json' };
    for (const foreign of [{ origin: 'http://evil.example' }, { origin: 'null' }, { 'sec-fetch-site': 'same-site' }]) {
      const answer = await ask('/api/regions', { method: 'POST', headers: { ...headers, ...foreign }, body });
      expect(answer.status).toBe(403);
    }
    expect((await ask('/api/regions')).body).not.toContain('From elsewhere');
    const own = await ask('/api/regions', { method: 'POST', headers: { ...headers, origin: serverUrl }, body });
    expect(own.status).toBe(201);
    expect((await ask('/api/regions')).body).toContain('From elsewhere');
    const gone = await ask(`/api/regions/${JSON.parse(own.body).slug}`, {
      method: 'DELETE',
      headers: { origin: serverUrl },
    });
    expect(gone.status).toBe(204);
  });

  test('sends the safety headers with pages, data and static files, and does not say what it is made with', async () => {
    const page = await ask('/');
    const script = /src="(\/_next\/static\/[^"]+\.js)"/.exec(page.body)?.[1];
    expect(script).toBeDefined();
    for (const answer of [page, await ask('/api/regions'), await ask(script as string), await ask('/nowhere')]) {
      expect(answer.headers['x-content-type-options']).toBe('nosniff');
      expect(answer.headers['referrer-policy']).toBe('same-origin');
      expect(answer.headers['content-security-policy']).toContain("object-src 'none'");
      expect(answer.headers['x-powered-by']).toBeUndefined();
    }
  });

  test('gives every page a nonce of its own, and every script of the page carries it', async () => {
    const nonces = new Set<string>();
    for (let i = 0; i < 2; i++) {
      // A nonce that the client sends along is not taken.
      const page = await ask('/', {
        headers: { 'content-security-policy': "script-src 'nonce-theirs'", 'x-nonce': 'theirs' },
      });
      const nonce = /'nonce-([^']+)'/.exec(String(page.headers['content-security-policy']))?.[1] as string;
      nonces.add(nonce);
      const scripts = page.body.match(/<script\b[^>]*>/g) ?? [];
      expect(scripts.length).toBeGreaterThan(3);
      for (const tag of scripts) expect(tag).toContain(`nonce="${nonce}"`);
      expect(page.body).not.toContain('theirs');
    }
    expect(nonces.size).toBe(2);
  });

  test.each([
    '/api/regions/..%2f..%2fetc%2fpasswd',
    '/api/regions/none/ranking',
    '/api/regions/%00/stations',
    '/api/jobs/..%2fx',
    '/regions/%E0%A4%A',
    '/api/regions/none/layers/..%2f1',
    '/_next/static/..%2f..%2fpackage.json',
    '/_next/static/%2e%2e/%2e%2e/package.json',
  ])('answers %s with an error that names no path of this machine', async (path) => {
    const answer = await ask(path);
    expect(answer.status).toBeGreaterThanOrEqual(400);
    expect(answer.status).toBeLessThan(500);
    expect(answer.body).not.toContain(process.cwd());
    expect(answer.body).not.toMatch(/\bat .*\.(js|ts|mjs):\d+/);
    expect(answer.body).not.toContain('"devDependencies"');
  });
});

test('a server that others can reach asks for its token, takes it from the address once, and then knows the browser', async () => {
  const trial = await startTrial(['--host', '0.0.0.0'], {
    HUNGERSTONE_TOKEN: 'stone & water',
    HUNGERSTONE_AS_BUILT: '1',
  });
  try {
    const { url } = trial;
    expect((await ask('/', { url })).status).toBe(401);
    expect((await ask('/api/regions', { url })).status).toBe(401);
    const headers = { authorization: 'Bearer stone & water' };
    expect((await ask('/api/regions', { url, headers })).status).toBe(200);
    const page = await newPage();
    // Another address is another host to the harness; here it is the one we mean.
    await page.unrouteAll();
    await page.goto(`${url}/?token=${encodeURIComponent('stone & water')}`);
    expect(page.url()).toBe(`${url}/`);
    await hydrated(page);
    expect((await page.reload())?.status()).toBe(200);
  } finally {
    expect(await trial.stop()).toBe(0);
  }
});
