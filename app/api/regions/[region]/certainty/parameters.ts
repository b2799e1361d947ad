import * as z from 'zod';
import { longTableParameters } from '@/app/api/_http/long-table';
import { MOST_STEEPEST, USUAL_STEEPEST } from '@/lib/region/certainty-types';

/** "Among the k steepest declines". */
export const steepestParameter = {
  k: z.coerce
    .number()
    .int()
    .min(1)
    .max(MOST_STEEPEST)
    .default(USUAL_STEEPEST)
    .describe('of a table: the probability asked for is that of being among the k steepest declines'),
};

export const certaintyParameters = { ...longTableParameters, ...steepestParameter };
