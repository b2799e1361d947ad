import * as z from 'zod';
import { longTableParameters } from '@/app/api/_http/long-table';
import { areaFromText } from '@/lib/region/in-polygon';
import { CHANCE_METHODS } from '@/lib/region/regional-types';

export const regionalParameters = {
  ...longTableParameters,
  method: z
    .enum(CHANCE_METHODS)
    .default('permutation')
    .describe('how chance is imitated: years in random order, or drawn anew with their carry-over'),
  area: z
    .string()
    .optional()
    .describe(
      'corners of a group’s area, longitude,latitude in degrees with ; between: the stations inside are answered too',
    )
    .transform((text, context) => {
      if (text === undefined) return null;
      const read = areaFromText(text);
      if ('area' in read) return read.area;
      context.addIssue(read.problem);
      return z.NEVER;
    }),
};
