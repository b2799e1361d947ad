import * as z from 'zod';
import { CORRECTIONS } from '@/lib/intake/types';
import { FILE_KINDS } from '@/lib/jobs/import-types';
import { UNITS } from '@/lib/series/quantities';
import { OVERLAP_RULES } from '@/lib/store/lay-parts';

export const fileChoices = z
  .strictObject({
    kind: z.enum(FILE_KINDS).describe('what the file is; else recognised by what it holds'),
    mapping: z
      .record(z.string(), z.unknown())
      .describe('how the file is to be read, key by key, as in the import command'),
    unit: z.enum(UNITS).describe('unit of the values'),
    station: z.string().min(1).describe('code of the station of a file that names none'),
    matchCodes: z.boolean().describe('take codes that differ by case or leading zeros for those of the station list'),
    corrections: z.array(z.enum(CORRECTIONS)).describe('of the coordinates in a station list'),
  })
  .partial();

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
