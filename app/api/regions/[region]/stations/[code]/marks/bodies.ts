import * as z from 'zod';
import { parseIsoDate } from '@/lib/calendar/day';
import { QUANTITIES } from '@/lib/series/quantities';
import { MARK_KINDS } from '@/lib/store/marks-on-flags';

const day = z
  .string()
  .refine((text) => !Number.isNaN(parseIsoDate(text)), { error: 'must be a day that exists, as YYYY-MM-DD' });

export const newMark = z
  .strictObject({
    first: day.describe('first day, YYYY-MM-DD'),
    last: day.describe('last day, included'),
    kind: z
      .enum(MARK_KINDS)
      .describe(
        'reject: the days count as missing; accept: neither checks nor earlier rejections hold; note: a remark',
      ),
    reason: z.string().trim().min(1, 'must say why').max(1000),
    by: z.string().trim().max(200).default('').describe('who'),
    quantity: z.enum(QUANTITIES).default('flow'),
  })
  .refine(({ first, last }) => parseIsoDate(first) <= parseIsoDate(last), {
    error: 'must not come before "first"',
    path: ['last'],
  });

export const markParameters = {
  format: z.enum(['json', 'csv']).default('json'),
  quantity: z.enum(QUANTITIES).default('flow').describe('of which record'),
};
