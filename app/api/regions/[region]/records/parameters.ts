import * as z from 'zod';

/** Of tables that come under a basis, and as CSV without a description beside it. */
export const recordParameters = { format: z.enum(['json', 'csv']).default('json') };
