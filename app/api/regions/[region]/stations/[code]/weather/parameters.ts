import * as z from 'zod';
import { formatParameter } from '@/app/api/_http/table';
import { WEATHER_QUANTITIES } from '@/lib/region/pair-types';
import { MOST_ANTECEDENT_DAYS } from '@/lib/series/antecedent-sum';

export const weatherParameters = {
  ...formatParameter,
  quantity: z
    .enum(WEATHER_QUANTITIES)
    .optional()
    .describe('which weather; left out: rainfall, or evaporation where there is none'),
  from: z
    .string()
    .optional()
    .describe('code of the station where it was measured; left out: the station itself, else the nearest with weather'),
  antecedentDays: z.coerce
    .number()
    .int()
    .min(1)
    .max(MOST_ANTECEDENT_DAYS)
    .optional()
    .describe('days summed, the last of them the date of the minimum; left out: 180'),
};
