import * as z from 'zod';
import { FLOW_UNITS } from '@/lib/intake/types';
import { FILE_KINDS } from '@/lib/jobs/import-types';

const fileChoices = z
  .strictObject({
    kind: z.enum(FILE_KINDS).describe('what the file is; else recognised by what it holds'),
    mapping: z
      .record(z.string(), z.unknown())
      .describe('how the file is to be read, key by key, as in the import command'),
    unit: z.enum(FLOW_UNITS).describe('unit of the flows'),
    station: z.string().min(1).describe('code of the station of a file that names none'),
  })
  .partial();

/** What a person says about an import; what is left out is recognised. */
export const importChoices = z
  .strictObject({
    all: fileChoices.describe('for every flow file without a choice of its own'),
    files: z.record(z.string(), fileChoices).describe('by file name'),
    revise: z.boolean().describe('take new values where they are unlike those that stand'),
    by: z.string().max(200).describe('who imports'),
  })
  .partial();
