/** Who may ask this server what. A web page anywhere can post to 127.0.0.1, and a name that is re-pointed to 127.0.0.1
 *  can read from it: so the Host must be one of ours, and whatever changes something must come from a page of ours.
 *  Beyond this machine a token is needed as well. Pure: a request's words in, a verdict out. */
import { createHash, timingSafeEqual } from 'node:crypto';

export interface SafetyPolicy {
  /** host names, lower case, without port; IPv6 in brackets */
  hosts: ReadonlySet<string>;
  /** needed on every request when not null */
  token: string | null;
}

export interface RequestWords {
  method: string;
  /** path and query */
  url: string;
  headers: Record<string, string | string[] | undefined>;
}

export type Verdict =
  | { kind: 'pass' }
  | { kind: 'refuse'; status: 400 | 401 | 403 | 421; reason: string }
  /** the token came in the address: keep it in a cookie and take it out of the address */
  | { kind: 'redirect'; location: string; cookie: string };

export const LOOPBACK_HOSTS = ['localhost', '127.0.0.1', '[::1]'] as const;
const COOKIE = 'hungerstone-token';
const READING = new Set(['GET', 'HEAD']);

/** Judges one request; the first rule that speaks decides. */
export function judgeRequest(request: RequestWords, policy: SafetyPolicy): Verdict {
  const host = one(request.headers.host);
  const name = hostName(host);
  if (name === null) return { kind: 'refuse', status: 400, reason: 'The request names no host.' };
  if (!policy.hosts.has(name)) {
    return { kind: 'refuse', status: 421, reason: `This server does not answer for ${name}; start it with --host.` };
  }
  if (!isDecodable(request.url)) return { kind: 'refuse', status: 400, reason: 'The address is not well formed.' };
  if (!READING.has(request.method) && !isFromOwnPage(request.headers, host)) {
    return { kind: 'refuse', status: 403, reason: 'Only a page of this site may change something here.' };
  }
  return policy.token === null ? { kind: 'pass' } : judgeToken(request, policy.token);
}

/** The name in a Host header without its port, lower case; null when it is none. */
export function hostName(host: string | undefined): string | null {
  const match = /^(\[[0-9a-f:.]+\]|[a-z0-9._-]+)(?::\d{1,5})?$/i.exec(host ?? '');
  return match ? match[1].toLowerCase() : null;
}

/** Whether the percent signs of an address stand for letters: nothing behind us expects others. */
function isDecodable(url: string): boolean {
  try {
    decodeURIComponent(url.split('?')[0]);
    return true;
  } catch {
    return false;
  }
}

/** Programs send neither header and are let through; browsers send at least one with everything but GET and HEAD. */
function isFromOwnPage(headers: RequestWords['headers'], host: string | undefined): boolean {
  const site = one(headers['sec-fetch-site']);
  if (site !== undefined && site !== 'same-origin' && site !== 'none') return false;
  const origin = one(headers.origin);
  if (origin === undefined) return true;
  return URL.canParse(origin) && new URL(origin).host === host?.toLowerCase();
}

function judgeToken(request: RequestWords, token: string): Verdict {
  const bearer = /^Bearer +(.+)$/i.exec(one(request.headers.authorization) ?? '')?.[1];
  if (bearer !== undefined && isSame(bearer, token)) return { kind: 'pass' };
  const kept = cookieValue(one(request.headers.cookie), COOKIE);
  if (kept !== undefined && isSame(kept, cookieOf(token))) return { kind: 'pass' };
  const query = request.url.indexOf('?');
  const parameters = new URLSearchParams(query < 0 ? '' : request.url.slice(query));
  const given = parameters.get('token');
  if (given !== null && READING.has(request.method) && isSame(given, token)) {
    parameters.delete('token');
    const rest = parameters.toString();
    // One leading slash: two would make the browser take the first part of the path for another host.
    const path = request.url.slice(0, query).replace(/^[/\\]*/, '/');
    return {
      kind: 'redirect',
      location: rest ? `${path}?${rest}` : path,
      cookie: `${COOKIE}=${cookieOf(token)}; Path=/; HttpOnly; SameSite=Lax`,
    };
  }
  return {
    kind: 'refuse',
    status: 401,
    reason: 'A token is needed: open the address with ?token=… once, or send it as Authorization: Bearer ….',
  };
}

/** The cookie carries a digest, so that the token itself does not lie about in a browser's files. */
const cookieOf = (token: string): string => createHash('sha256').update(`cookie ${token}`).digest('hex');

/** Compares digests, in a time that does not depend on where two words differ. */
function isSame(a: string, b: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(a), digest(b));
}

function cookieValue(header: string | undefined, name: string): string | undefined {
  const pair = header?.split(/; */).find((text) => text.startsWith(`${name}=`));
  return pair?.slice(name.length + 1);
}

const one = (value: string | string[] | undefined): string | undefined => (Array.isArray(value) ? value[0] : value);

/** The hosts that a server listening on `listen` answers for, beside this machine's own names.
 *  @param listen     the --host word: a name or an address
 *  @param interfaces addresses of this machine, for when it listens on all of them */
export function allowedHosts(listen: string, interfaces: readonly string[] = []): Set<string> {
  const written = (address: string) =>
    (address.includes(':') ? `[${address.replace(/%.*$/, '')}]` : address).toLowerCase();
  const all = listen === '0.0.0.0' || listen === '::';
  return new Set([...LOOPBACK_HOSTS, ...(all ? interfaces : [listen]).map(written)]);
}

/** Whether only this machine can reach a server that listens on `host`. */
export function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || /^127\.\d{1,3}\.\d{1,3}\.\d{1,3}$/.test(host);
}

/** The Content-Security-Policy of one answer.
 *  Scripts run only from this site or with the nonce; styles may be inline, for figures and maps place their parts so;
 *  map tiles may come from any http(s) address, for the user chooses it.
 *  @param dev  code that is reloaded as it changes needs eval and a web socket */
export function contentSecurityPolicy(nonce: string, dev = false): string {
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'${dev ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob: http: https:",
    "font-src 'self' data:",
    `connect-src 'self'${dev ? ' ws:' : ''}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}

/** Headers for every answer. */
export function safetyHeaders(policy: string): Record<string, string> {
  return {
    'Content-Security-Policy': policy,
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'same-origin',
    'X-Frame-Options': 'DENY',
    'Cross-Origin-Opener-Policy': 'same-origin',
    'Cross-Origin-Resource-Policy': 'same-origin',
  };
}
