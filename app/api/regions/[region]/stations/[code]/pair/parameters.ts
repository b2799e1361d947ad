import * as z from 'zod';
import { formatParameter } from '@/app/api/_http/table';

export const pairParameters = {
  ...formatParameter,
  with: z
    .string()
    .optional()
    .describe(
      'codes of the reference stations, with commas between (a comma inside a code as %2C); left out: the three natural stations whose annual figures go most with the station’s',
    ),
};
