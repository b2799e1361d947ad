import * as z from 'zod';
import { parseIsoDate } from '@/lib/calendar/day';
import { QUANTITIES } from '@/lib/series/quantities';

const isoDay = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}$/, 'must be a date as YYYY-MM-DD')
  .refine((text) => !Number.isNaN(parseIsoDate(text)), 'must be a day that exists');

export const daysParameters = {
  first: isoDay.describe('first day, YYYY-MM-DD'),
  last: isoDay.describe('last day, YYYY-MM-DD; at most 100 years after the first'),
  quantity: z.enum(QUANTITIES).default('flow').describe('which daily quantity'),
  format: z.enum(['json', 'csv']).default('json'),
};
