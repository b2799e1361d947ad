import * as z from 'zod';
import { BASIS_KEYS, type Basis, basisFromQuery } from '@/lib/basis';
import type { Narrowing } from '@/lib/export/narrow';
import { parameterWords } from './parameter-words';
import { Problem } from './problem';

/** Stations to hold: `stations=A,B` by code, `in=west,south,east,north` by place. */
export const narrowingParameters = {
  stations: z
    .string()
    .optional()
    .describe(
      'codes of the stations to answer, with commas between (a comma inside a code as %2C); ranks and adjusted p stay those of the region',
    ),
  in: z
    .string()
    .regex(/^-?[\d.]+(,-?[\d.]+){3}$/, 'must be west,south,east,north in degrees')
    .optional()
    .describe('west,south,east,north in degrees: only stations inside; west > east runs over the date line'),
};

/** Reads the parameters of a request.
 *  @param shape      the parameters that this route takes, by zod
 *  @param withBasis  whether basis keys may stand beside them
 *  @throws Problem that names a parameter nobody reads: a slip of the pen would else be answered with other numbers; or
 *          one that cannot be used, with what was given and what would do */
export function readParameters<Shape extends z.ZodRawShape>(
  request: Request,
  shape: Shape,
  { withBasis = false } = {},
): z.output<z.ZodObject<Shape>> {
  const { searchParams } = new URL(request.url);
  const known = [...Object.keys(shape), ...(withBasis ? BASIS_KEYS : [])];
  for (const name of searchParams.keys()) {
    if (!known.includes(name)) {
      throw new Problem(
        'bad-parameter',
        `Unknown parameter "${name}"; the parameters are ${known.join(', ') || 'none'}.`,
      );
    }
  }
  const given = Object.fromEntries([...searchParams].filter(([name]) => name in shape));
  const read = z.object(shape).safeParse(given);
  if (read.success) return read.data;
  const wrong = read.error.issues.map((issue) => {
    const name = String(issue.path[0]);
    return `"${name}": ${parameterWords(issue, given[name])}`;
  });
  throw new Problem('bad-parameter', `${wrong.join('; ')}.`);
}

/** The basis that a request asks for: its query laid over the region's own. */
export function basisOf(request: Request, region: { basis: Basis }): Basis {
  return basisFromQuery(new URL(request.url).searchParams, region.basis);
}

export function narrowingOf({ stations, in: bounds }: { stations?: string; in?: string }): Narrowing {
  const [west, south, east, north] = (bounds ?? '').split(',').map(Number);
  return {
    ...(stations === undefined ? {} : { codes: stations.split(',').map(decodedCode) }),
    ...(bounds === undefined ? {} : { bounds: { west, south, east, north } }),
  };
}

/** A code that holds a comma or a percent sign comes with it as %2C or %25. */
function decodedCode(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    throw new Problem('bad-parameter', `"${text}" is no station code: write a percent sign as %25 and a comma as %2C.`);
  }
}

/** Reads a JSON body.
 *  @throws Problem when it is no JSON; ZodError when it is not of the schema */
export async function readJson<Schema extends z.ZodType>(request: Request, schema: Schema): Promise<z.output<Schema>> {
  let body: unknown;
  try {
    body = await request.json();
  } catch (error) {
    throw new Problem('bad-body', 'The body must be JSON.', { cause: error instanceof Error ? error.message : '' });
  }
  return schema.parse(body);
}

/** Reads a JSON body that may be left out: nothing stands for an empty object. */
export async function readOptionalJson<Schema extends z.ZodType>(
  request: Request,
  schema: Schema,
): Promise<z.output<Schema>> {
  // a server hands on an empty body as a stream without bytes, not as none
  const isEmpty = (await request.clone().text()).trim() === '';
  return isEmpty ? schema.parse({}) : readJson(request, schema);
}
