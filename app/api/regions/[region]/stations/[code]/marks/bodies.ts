import * as z from 'zod';
import { parseIsoDate } from '@/lib/calendar/day';
import { QUANTITIES } from '@/lib/series/quantities';
import { MARK_KINDS } from '@/lib/store/marks-on-flags';

const day = z
  .string()
  .refine((text) => !Number.isNaN(parseIsoDate(text)), { error: 'must be a day that exists, as YYYY-MM-DD' });

/** Stretches that one request marks; the checks list at most as many of a kind, and of several kinds. */
const MOST_STRETCHES = 2000;

const stretch = { first: day.describe('first day, YYYY-MM-DD'), last: day.describe('last day, included') };
const inOrder = ({ first, last }: { first: string; last: string }) => parseIsoDate(first) <= parseIsoDate(last);
const NOT_IN_ORDER = { error: 'must not come before "first"', path: ['last'] };

export const newMark = z
  .strictObject({
    first: stretch.first.optional(),
    last: stretch.last.optional(),
    stretches: z
      .array(z.strictObject(stretch).refine(inOrder, NOT_IN_ORDER))
      .min(1)
      .max(MOST_STRETCHES)
      .optional()
      .describe('in place of first and last: several stretches, marked all of them or none'),
    kind: z
      .enum(MARK_KINDS)
      .describe(
        'reject: the days count as missing; accept: neither checks nor earlier rejections hold; note: a remark',
      ),
    reason: z.string().trim().min(1, 'must say why').max(1000),
    by: z.string().trim().max(200).default('').describe('who'),
    quantity: z.enum(QUANTITIES).default('flow'),
  })
  .refine(({ first, last, stretches }) => stretches !== undefined || first !== undefined || last === undefined, {
    error: 'must be given',
    path: ['first'],
  })
  .refine(({ first, last, stretches }) => stretches !== undefined || last !== undefined || first === undefined, {
    error: 'must be given',
    path: ['last'],
  })
  .refine(({ first, last, stretches }) => (stretches === undefined) !== (first === undefined && last === undefined), {
    error: 'must be given, or "first" and "last", but not both',
    path: ['stretches'],
  })
  .refine(({ first, last }) => first === undefined || last === undefined || inOrder({ first, last }), NOT_IN_ORDER);

/** The stretches that a body names, whichever way. */
export function stretchesOf({ first, last, stretches }: z.infer<typeof newMark>) {
  const named = stretches ?? (first === undefined || last === undefined ? [] : [{ first, last }]);
  return named.map((each) => ({ firstDay: parseIsoDate(each.first), lastDay: parseIsoDate(each.last) }));
}

export const markParameters = {
  format: z.enum(['json', 'csv']).default('json'),
  quantity: z.enum(QUANTITIES).default('flow').describe('of which record'),
};
