import * as z from 'zod';
import { BasisError } from '@/lib/basis';
import { IntakeError } from '@/lib/intake/types';
import { StoreBusyError } from '@/lib/store/busy';

/** Every way in which a request can fail: status and title in one place (RFC 9457, `type` ends in the code). */
const PROBLEMS = {
  'bad-parameter': { status: 400, title: 'A parameter cannot be used' },
  'bad-basis': { status: 400, title: 'The basis cannot be used' },
  'bad-body': { status: 400, title: 'The request cannot be read' },
  'cut-off': { status: 400, title: 'The upload did not arrive whole' },
  'not-found': { status: 404, title: 'There is no such thing here' },
  conflict: { status: 409, title: 'This would overwrite something' },
  'too-large': { status: 413, title: 'The upload is too large' },
  'bad-file': { status: 422, title: 'The file cannot be taken' },
  busy: { status: 503, title: 'The database is busy' },
  'no-space': { status: 507, title: 'There is not enough disk space' },
  unexpected: { status: 500, title: 'Something went wrong in the program' },
} as const;
export type ProblemCode = keyof typeof PROBLEMS;

/** Seconds after which a busy database may be asked again. */
const RETRY_AFTER_SECONDS = 2;

/** Thrown by a route for a failure of the table above; `detail` says what is wrong here and what would do. */
export class Problem extends Error {
  override name = 'Problem';
  constructor(
    readonly code: ProblemCode,
    readonly detail: string,
    readonly more: Record<string, unknown> = {},
  ) {
    super(detail);
  }
}

/** Any error as a problem. One that nobody foresaw gets a neutral sentence: it may hold paths or data. */
export function problemFrom(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (error instanceof BasisError) return new Problem('bad-basis', error.message);
  if (error instanceof IntakeError) return new Problem('bad-file', error.message, { problem: error.problem });
  if (error instanceof StoreBusyError) {
    return new Problem('busy', 'Another program is writing to the database. Try again in a moment.');
  }
  if (error instanceof z.ZodError) return new Problem('bad-parameter', issueWords(error));
  return new Problem('unexpected', 'The request could not be answered. The server’s own messages say why.');
}

function issueWords(error: z.ZodError): string {
  return error.issues
    .map(({ path, message }) => (path.length ? `"${path.join('.')}": ${message}` : message))
    .join('; ')
    .concat('.');
}

/** A problem as an `application/problem+json` answer. */
export function problemResponse(error: unknown): Response {
  const { code, detail, more } = problemFrom(error);
  const { status, title } = PROBLEMS[code];
  if (code === 'unexpected') process.emitWarning(error instanceof Error ? error : String(error));
  const body = { ...more, type: `urn:hungerstone:problem:${code}`, title, status, detail };
  return new Response(JSON.stringify(body), {
    status,
    headers: {
      'content-type': 'application/problem+json',
      'cache-control': 'no-store',
      ...(code === 'busy' ? { 'retry-after': String(RETRY_AFTER_SECONDS) } : {}),
    },
  });
}
