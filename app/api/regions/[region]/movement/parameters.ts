import * as z from 'zod';
import { plainFormatParameter } from '@/app/api/_http/plain-table';
import { Problem } from '@/app/api/_http/problem';
import { BASIS_KEYS, type Basis, basisFromQuery } from '@/lib/basis';

export const movementParameters = {
  ...plainFormatParameter,
  against: z
    .string()
    .default('')
    .describe(
      'the other terms: basis keys as in an address, laid over the region’s own and escaped as one value (days%3D30%26yearStart%3D4); empty for the region’s own terms',
    ),
};

/** The terms that a ranking is held against.
 *  @throws Problem that names what is no basis key; BasisError for a value that cannot be used */
export function againstBasis(against: string, region: { basis: Basis }): Basis {
  const query = new URLSearchParams(against);
  for (const name of query.keys()) {
    if (!(BASIS_KEYS as string[]).includes(name)) {
      throw new Problem('bad-parameter', `"against" names "${name}"; the basis keys are ${BASIS_KEYS.join(', ')}.`);
    }
  }
  return basisFromQuery(query, region.basis);
}
