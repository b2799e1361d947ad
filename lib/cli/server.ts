/** The http server in front of Next: request safety, long uploads, an orderly end. */

import { Console } from 'node:console';
import { randomBytes } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse, STATUS_CODES } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Duplex } from 'node:stream';
import {
  contentSecurityPolicy,
  judgeRequest,
  type SafetyPolicy,
  safetyHeaders,
  type Verdict,
} from './request-safety.ts';

/** How long open answers (event streams, downloads) may go on after a stop, ms. */
const GRACE = 3000;

export interface Site {
  address: string;
  /** starts Next behind the server; until then every request is told to come back */
  open(): Promise<void>;
  close(): Promise<void>;
}

interface Options {
  port: number;
  host: string;
  dev: boolean;
  policy: SafetyPolicy;
}

type Handler = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

/** Takes the port and answers 503 on it until `open`.
 *  @throws Error with one clear line when the port is taken or the address is not this machine's */
export async function listen(options: Options): Promise<Site> {
  const { host, dev, policy } = options;
  let handle: Handler | null = null;
  // Next listens for web sockets on the server it is given. This one never listens: what is emitted on it was judged.
  const nextSockets = createServer();
  const webSockets = new Set<Duplex>();
  let closeNext: (() => Promise<void>) | null = null;

  const server = createServer((request, response) => {
    const nonce = randomBytes(16).toString('base64');
    const contentPolicy = contentSecurityPolicy(nonce, dev);
    for (const [name, value] of Object.entries(safetyHeaders(contentPolicy))) response.setHeader(name, value);
    const verdict = judgeRequest(words(request), policy);
    if (verdict.kind !== 'pass') return answerVerdict(request, response, verdict);
    if (!handle)
      return answerProblem(response, 503, 'The site is starting; try again in a moment.', { 'Retry-After': '2' });
    // Next reads the nonce for its own scripts from the first of these headers, our layout from the second; whatever the
    // client sent there is dropped.
    request.headers['content-security-policy'] = contentPolicy;
    request.headers['x-nonce'] = nonce;
    handle(request, response).catch((error: unknown) => {
      process.stderr.write(`${request.method} ${request.url}: ${String(error)}\n`);
      if (response.headersSent) response.destroy();
      else answerProblem(response, 500, 'This request could not be answered.');
    });
  });
  // A large import may take longer than Node's five minutes; headers still have to come within one.
  server.requestTimeout = 0;
  server.on('upgrade', (request: IncomingMessage, socket: Duplex, head: Buffer) => {
    const verdict = judgeRequest({ ...words(request), method: 'UPGRADE' }, policy);
    if (verdict.kind !== 'pass' || nextSockets.listenerCount('upgrade') === 0) return void socket.destroy();
    webSockets.add(socket);
    socket.once('close', () => webSockets.delete(socket));
    nextSockets.emit('upgrade', request, socket, head);
  });

  const port = await takePort(server, options);
  const name = host === '0.0.0.0' ? '127.0.0.1' : host === '::' ? '::1' : host;
  return {
    address: `http://${name.includes(':') ? `[${name}]` : name}:${port}`,
    async open() {
      // Next tells its progress by console.log; stdout is for the address alone.
      globalThis.console = new Console(process.stderr);
      const { default: next } = await import('next');
      const app = next({ dev, hostname: host, port, dir: process.cwd(), httpServer: nextSockets });
      await app.prepare();
      handle = app.getRequestHandler();
      closeNext = () => app.close();
    },
    async close() {
      const closed = new Promise<void>((resolve) => server.close(() => resolve()));
      server.closeIdleConnections();
      for (const socket of webSockets) socket.destroy();
      const late = setTimeout(() => server.closeAllConnections(), GRACE);
      await closed;
      clearTimeout(late);
      await closeNext?.();
    },
  };
}

function takePort(server: Server, { port, host }: Options): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => reject(new Error(portProblem(error, port, host))));
    server.listen(port, host, () => resolve((server.address() as AddressInfo).port));
  });
}

function portProblem(error: NodeJS.ErrnoException, port: number, host: string): string {
  switch (error.code) {
    case 'EADDRINUSE':
      return `Port ${port} is taken by another program; choose one with --port, for example --port ${port + 1}.`;
    case 'EACCES':
      return `Port ${port} may not be used without special rights; choose one from 1024 on with --port.`;
    case 'EADDRNOTAVAIL':
    case 'ENOTFOUND':
      return `${host} is not an address of this machine; give another --host.`;
    default:
      return `Cannot listen on ${host}, port ${port}: ${error.message}`;
  }
}

const words = (request: IncomingMessage) => ({
  method: request.method ?? 'GET',
  url: request.url ?? '/',
  headers: request.headers,
});

function answerVerdict(
  request: IncomingMessage,
  response: ServerResponse,
  verdict: Exclude<Verdict, { kind: 'pass' }>,
) {
  // What a refused request would still send is not waited for.
  if (request.method !== 'GET' && request.method !== 'HEAD') response.setHeader('Connection', 'close');
  if (verdict.kind === 'refuse') return answerProblem(response, verdict.status, verdict.reason);
  response
    .writeHead(303, { Location: verdict.location, 'Set-Cookie': verdict.cookie, 'Cache-Control': 'no-store' })
    .end();
}

/** RFC 9457 problem details. */
function answerProblem(response: ServerResponse, status: number, detail: string, headers: Record<string, string> = {}) {
  const body = JSON.stringify({ type: 'about:blank', title: STATUS_CODES[status], status, detail });
  response.writeHead(status, { 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store', ...headers });
  response.end(body);
}

/** Resolves once a signal has asked for the end; a second signal ends at once. */
export function untilStopped(): Promise<void> {
  return new Promise((resolve) => {
    let asked = false;
    const stop = () => {
      if (asked) process.exit(1);
      asked = true;
      process.stderr.write('Stopping …\n');
      resolve();
    };
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, stop);
  });
}
