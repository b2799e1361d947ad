import * as z from 'zod';
import { tableParameters } from '@/app/api/_http/table';
import { CURVE_KINDS } from '@/lib/jobs/types';

export const curveParameters = {
  ...tableParameters,
  kind: z
    .enum(CURVE_KINDS)
    .default('period')
    .describe('period: all days of usable years pooled; median-annual: the median of the years’ own curves'),
};
