import { describe, expect, test } from 'vitest';
import {
  allowedHosts,
  contentSecurityPolicy,
  hostName,
  isLoopback,
  judgeRequest,
  type RequestWords,
} from '../../../lib/cli/request-safety.ts';

const LOCAL = { hosts: allowedHosts('127.0.0.1'), token: null };
const GUARDED = { hosts: allowedHosts('192.168.1.5'), token: 'low water' };

const request = (headers: RequestWords['headers'], method = 'GET', url = '/'): RequestWords => ({
  method,
  url,
  headers: { host: 'localhost:3000', ...headers },
});
const kindOf = (words: RequestWords, policy: Parameters<typeof judgeRequest>[1] = LOCAL) => {
  const verdict = judgeRequest(words, policy);
  return verdict.kind === 'refuse' ? verdict.status : verdict.kind;
};

describe('judgeRequest by Host', () => {
  test.each(['localhost', 'localhost:3000', 'LOCALHOST:1', '127.0.0.1:3000', '[::1]:3000', '[::1]'])(
    'lets %s in',
    (host) => {
      expect(kindOf(request({ host }))).toBe('pass');
    },
  );
  test.each([
    'evil.example',
    'localhost.evil.example:3000',
    '127.0.0.1.evil.example',
    '127.0.0.2:3000',
    '192.168.1.5:3000',
    '[::2]:3000',
  ])('answers 421 to %s, whatever the method', (host) => {
    expect(kindOf(request({ host }))).toBe(421);
    expect(kindOf(request({ host, origin: `http://${host}` }, 'POST'))).toBe(421);
  });
  test.each([undefined, '', 'localhost:port', 'user@localhost', 'localhost/path'])('answers 400 to host %s', (host) => {
    expect(kindOf(request({ host }))).toBe(400);
  });
  test('lets the --host address in, and of all addresses only this machine’s', () => {
    expect(kindOf(request({ host: '192.168.1.5:3000' }), { ...LOCAL, hosts: allowedHosts('192.168.1.5') })).toBe(
      'pass',
    );
    const hosts = allowedHosts('0.0.0.0', ['10.0.0.7', 'fe80::1%eth0', 'Gauge-PC']);
    expect(kindOf(request({ host: '10.0.0.7:3000' }), { ...LOCAL, hosts })).toBe('pass');
    expect(kindOf(request({ host: '[fe80::1]:3000' }), { ...LOCAL, hosts })).toBe('pass');
    expect(kindOf(request({ host: 'gauge-pc:3000' }), { ...LOCAL, hosts })).toBe('pass');
    expect(kindOf(request({ host: '10.0.0.8:3000' }), { ...LOCAL, hosts })).toBe(421);
    expect(kindOf(request({ host: '0.0.0.0:3000' }), { ...LOCAL, hosts })).toBe(421);
  });
});

test('judgeRequest answers 400 to an address whose percent signs mean nothing, and reads the others', () => {
  for (const url of ['/regions/%E0%A4%A', '/%', '/%zz?x=1']) expect(kindOf(request({}, 'GET', url)), url).toBe(400);
  for (const url of ['/regions/m%C3%BChl%2fbach', '/?x=%zz', '/100%25'])
    expect(kindOf(request({}, 'GET', url)), url).toBe('pass');
});

describe('judgeRequest of what changes something', () => {
  test.each(['POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'UPGRADE'])(
    '%s passes from our own page, not from another',
    (method) => {
      expect(kindOf(request({ origin: 'http://localhost:3000', 'sec-fetch-site': 'same-origin' }, method))).toBe(
        'pass',
      );
      expect(kindOf(request({ origin: 'http://evil.example', 'sec-fetch-site': 'cross-site' }, method))).toBe(403);
    },
  );
  test.each([
    ['another port of this machine', { origin: 'http://localhost:8080' }],
    ['another name of this machine', { origin: 'http://127.0.0.1:3000' }],
    ['a page without an origin', { origin: 'null' }],
    ['an origin that is none', { origin: 'localhost' }],
    ['another port, by Sec-Fetch-Site alone', { 'sec-fetch-site': 'same-site' }],
    ['elsewhere, by Sec-Fetch-Site alone', { 'sec-fetch-site': 'cross-site' }],
    ['elsewhere, though the origin looks right', { origin: 'http://localhost:3000', 'sec-fetch-site': 'cross-site' }],
  ])('POST from %s answers 403', (_, headers) => {
    expect(kindOf(request(headers, 'POST'))).toBe(403);
  });
  test('POST of a program, which sends neither header, passes', () => {
    expect(kindOf(request({}, 'POST'))).toBe('pass');
  });
  test('GET and HEAD from another page pass: a link to this site is no harm', () => {
    expect(kindOf(request({ 'sec-fetch-site': 'cross-site' }))).toBe('pass');
    expect(kindOf(request({ origin: 'http://evil.example' }, 'HEAD'))).toBe('pass');
  });
});

describe('judgeRequest with a token', () => {
  const cookieOf = (url: string): string => {
    const verdict = judgeRequest(request({}, 'GET', url), GUARDED);
    if (verdict.kind !== 'redirect') throw new Error(`expected a redirect, got ${JSON.stringify(verdict)}`);
    return verdict.cookie;
  };
  test('answers 401 without one and with a wrong one', () => {
    expect(kindOf(request({}), GUARDED)).toBe(401);
    expect(kindOf(request({ authorization: 'Bearer low wate' }), GUARDED)).toBe(401);
    expect(kindOf(request({ authorization: 'Basic low water' }), GUARDED)).toBe(401);
    expect(kindOf(request({}, 'GET', '/?token=high+water'), GUARDED)).toBe(401);
    expect(kindOf(request({ cookie: 'hungerstone-token=low water' }), GUARDED)).toBe(401);
  });
  test('passes Authorization: Bearer, also for a POST of a program', () => {
    expect(kindOf(request({ authorization: 'Bearer low water' }), GUARDED)).toBe('pass');
    expect(kindOf(request({ authorization: 'bearer low water' }, 'POST'), GUARDED)).toBe('pass');
  });
  test('takes it from the address, keeps it in a cookie, and asks for the address without it', () => {
    const verdict = judgeRequest(request({}, 'GET', '/regions/upper?days=30&token=low+water&x=1'), GUARDED);
    expect(verdict).toMatchObject({ kind: 'redirect', location: '/regions/upper?days=30&x=1' });
    const cookie = cookieOf('/?token=low%20water');
    expect(cookie).toMatch(/; Path=\/; HttpOnly; SameSite=Lax$/);
    expect(cookie).not.toContain('water');
    const kept = cookie.split(';')[0];
    expect(kindOf(request({ cookie: `theme=dark; ${kept}` }), GUARDED)).toBe('pass');
    expect(kindOf(request({ cookie: kept }, 'POST'), GUARDED)).toBe('pass');
    expect(kindOf(request({ cookie: kept, origin: 'http://evil.example' }, 'POST'), GUARDED)).toBe(403);
    expect(kindOf(request({ cookie: `x${kept}` }), GUARDED)).toBe(401);
  });
  test('never sends a browser to another host', () => {
    for (const url of ['//evil.example/?token=low+water', '/\\evil.example/?token=low+water']) {
      expect(judgeRequest(request({}, 'GET', url), GUARDED)).toMatchObject({ location: '/evil.example/' });
    }
  });
  test('does not take it from the address of a POST', () => {
    expect(kindOf(request({}, 'POST', '/?token=low+water'), GUARDED)).toBe(401);
  });
});

test('hostName takes the port away and lowers the letters', () => {
  expect(hostName('Example.ORG:80')).toBe('example.org');
  expect(hostName('[::1]:3000')).toBe('[::1]');
  expect(hostName('::1')).toBeNull();
});

test.each([
  ['127.0.0.1', true],
  ['127.8.8.8', true],
  ['localhost', true],
  ['::1', true],
  ['0.0.0.0', false],
  ['::', false],
  ['128.0.0.1', false],
  ['127.0.0.1.example', false],
])('isLoopback(%s) is %s', (host, expected) => {
  expect(isLoopback(host)).toBe(expected);
});

test('contentSecurityPolicy allows scripts of this site and with the nonce only, and tiles from anywhere', () => {
  const policy = contentSecurityPolicy('abc=');
  expect(policy).toContain("script-src 'self' 'nonce-abc=';");
  expect(policy).toContain("img-src 'self' data: blob: http: https:;");
  expect(policy).not.toContain('unsafe-eval');
  expect(contentSecurityPolicy('abc=', true)).toContain('unsafe-eval');
});
