import * as z from 'zod';
import { waitParameter } from '@/app/api/_http/long-answer';
import { plainFormatParameter } from '@/app/api/_http/plain-table';
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

export const certaintyParameters = { ...plainFormatParameter, ...waitParameter, ...steepestParameter };
