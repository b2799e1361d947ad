import * as z from 'zod';
import { fileChoices, importChoices } from '@/app/api/regions/[region]/imports/bodies';

/** Files that are looked at in one request. */
const MOST_AT_ONCE = 100;

export const uploadChange = z.strictObject({
  files: z
    .record(z.string(), fileChoices)
    .refine((files) => Object.keys(files).length <= MOST_AT_ONCE, `takes at most ${MOST_AT_ONCE} files at once`)
    .default({})
    .describe('by file name; each is looked at anew'),
  leaveOut: z.array(z.string()).optional().describe('names of all files that are to stay out of the import'),
});

export const previewOrder = z.strictObject({
  file: z.string().describe('name of a file of the upload'),
  choices: fileChoices.default({}).describe('how it is to be read; kept for the import'),
});

export const importOrder = z.strictObject({
  choices: importChoices.default({}).describe('laid over what has been said about each file'),
  leaveOut: z.array(z.string()).default([]).describe('names of files that stay out of the import'),
  dryRun: z.boolean().default(false).describe('read, check and compare, and change nothing'),
  region: z
    .strictObject({ name: z.string().trim().min(1, 'a region needs a name').max(200) })
    .optional()
    .describe('the region to be made, of an upload that belongs to none'),
});
