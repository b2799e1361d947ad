import * as z from 'zod';
import { fileChoices } from '@/lib/jobs/file-choices';
import { OVERLAP_RULES } from '@/lib/store/lay-parts';

export { fileChoices };

/** What a person says about an import; what is left out is recognised. */
export const importChoices = z
  .strictObject({
    all: fileChoices.describe('for every flow file without a choice of its own'),
    files: z.record(z.string(), fileChoices).describe('by file name'),
    revise: z.boolean().describe('take new values where they are unlike those that stand'),
    rule: z.enum(OVERLAP_RULES).describe('what becomes of values that stand; without it, unlike ones refuse the file'),
    dryRun: z.boolean().describe('read, check and compare, and change nothing'),
    by: z.string().max(200).describe('who imports'),
  })
  .partial();
