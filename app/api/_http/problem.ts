import * as z from 'zod';
import { BasisError } from '@/lib/basis';
import { IntakeError } from '@/lib/intake/types';
import { StoreBusyError } from '@/lib/store/busy';
import { StoreError, type StoreProblem } from '@/lib/store/errors';
import { ImportRefused } from '@/lib/store/import-refused';

/** Every way in which a request can fail: status and title in one place (RFC 9457, `type` ends in the code). */
const PROBLEMS = {
  'bad-parameter': { status: 400, title: 'A parameter cannot be used' },
  'bad-basis': { status: 400, title: 'The basis cannot be used' },
  'bad-body': { status: 400, title: 'The request cannot be read' },
  'cut-off': { status: 400, title: 'The upload did not arrive whole' },
  'not-found': { status: 404, title: 'There is no such thing here' },
  conflict: { status: 409, title: 'Something that is there stands against it' },
  changed: { status: 412, title: 'It was changed meanwhile' },
  'too-large': { status: 413, title: 'The upload is too large' },
  'bad-file': { status: 422, title: 'The file cannot be taken' },
  busy: { status: 503, title: 'The database is busy' },
  'no-space': { status: 507, title: 'There is not enough disk space' },
  'no-database': { status: 503, title: 'The database cannot be used' },
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

/** The store's problems as ours. Its messages may name files of the server, so only those about input are passed on. */
const OF_THE_STORE: Record<StoreProblem, ProblemCode> = {
  exists: 'conflict',
  'not-found': 'not-found',
  'bad-input': 'bad-body',
  missing: 'no-database',
  unwritable: 'no-database',
  'not-a-database': 'no-database',
  'not-hungerstone': 'no-database',
  newer: 'no-database',
  'bad-url': 'no-database',
  'in-use': 'busy',
  needed: 'conflict',
  changed: 'changed',
  lost: 'unexpected',
};

function storeProblem({ code, message }: StoreError): Problem {
  const ours = OF_THE_STORE[code];
  if (ours === 'no-database') return new Problem(ours, 'The server’s own messages say why.');
  return new Problem(ours, message);
}

/** Any error as a problem. One that nobody foresaw gets a neutral sentence: it may hold paths or data. */
function problemFrom(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (error instanceof BasisError) return new Problem('bad-basis', error.message);
  if (error instanceof IntakeError || error instanceof ImportRefused) {
    return new Problem('bad-file', error.message, { problem: error.problem });
  }
  if (error instanceof StoreError && OF_THE_STORE[error.code] !== 'unexpected') return storeProblem(error);
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
  if (code === 'unexpected' || code === 'no-database')
    process.emitWarning(error instanceof Error ? error : String(error));
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
