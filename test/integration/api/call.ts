import { expect } from 'vitest';

const ORIGIN = 'http://127.0.0.1:3000';

type Handler<Params> = (request: Request, context: { params: Promise<Params> }) => Promise<Response>;

/** Calls a route handler as the server does. */
export function call<Params>(
  handler: Handler<Params>,
  path: string,
  params: Params,
  init: RequestInit = {},
): Promise<Response> {
  return handler(new Request(`${ORIGIN}${path}`, init), { params: Promise.resolve(params) });
}

/** Expects a problem document and answers it. */
export async function problemOf(response: Response, status: number) {
  expect(response.status).toBe(status);
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  const problem = await response.json();
  expect(problem).toMatchObject({ status, title: expect.any(String), detail: expect.any(String) });
  return problem as { type: string; title: string; detail: string };
}
