import * as z from 'zod';

/** What a person says of a suggested pair of stations. */
export const suggestionAnswer = z.strictObject({
  upstream: z.string().min(1).max(100).describe('code of the upper station'),
  downstream: z.string().min(1).max(100).describe('code of the station below it'),
  rejected: z.boolean().describe('true: no link, do not suggest it again; false: it may be suggested again'),
});
