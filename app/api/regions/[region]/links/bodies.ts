import * as z from 'zod';
import { LINK_SOURCES } from '@/lib/region/link-suggestions';

/** Two stations on one river. */
export const link = z.strictObject({
  upstream: z.string().min(1).max(100).describe('code of the upper station'),
  downstream: z.string().min(1).max(100).describe('code of the station below it'),
  source: z.enum(LINK_SOURCES).default('person').describe('what the link rests on'),
});
