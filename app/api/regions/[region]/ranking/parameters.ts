import * as z from 'zod';
import { tableParameters } from '@/app/api/_http/table';
import { steepestParameter } from '../certainty/parameters';

export const rankingParameters = {
  ...tableParameters,
  ...steepestParameter,
  spans: z
    .enum(['90', 'none'])
    .default('90')
    .describe(
      '90: with the 90 % interval of each place, the chance of being among the k steepest and the detectable trend, which takes seconds in a large region; none: without',
    ),
};
