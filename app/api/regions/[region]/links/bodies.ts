import * as z from 'zod';
import { LINK_SOURCES } from '@/lib/region/link-suggestions';

/** Two stations on one river. */
export const link = z.strictObject({
  upstream: z.string().min(1).max(100).describe('code of the upper station'),
  downstream: z.string().min(1).max(100).describe('code of the station below it'),
  source: z.enum(LINK_SOURCES).default('person').describe('what the link rests on'),
});

/** More than the stations of any region. */
const MOST_LINKS = 50_000;

/** One link, or several in one. */
export const newLinks = link
  .partial({ upstream: true, downstream: true })
  .extend({
    links: z.array(link).min(1).max(MOST_LINKS).optional().describe('in place of one: several, all of them or none'),
  })
  .refine(
    ({ upstream, downstream, links }) => links !== undefined || (upstream !== undefined && downstream !== undefined),
    {
      error: 'must be given, with "downstream", or "links"',
      path: ['upstream'],
    },
  )
  .refine(
    ({ upstream, downstream, links }) => links === undefined || (upstream === undefined && downstream === undefined),
    {
      error: 'must not be given beside "upstream" and "downstream"',
      path: ['links'],
    },
  );
