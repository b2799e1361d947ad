import * as z from 'zod';

export const coverageParameters = { format: z.enum(['json', 'csv']).default('json') };
