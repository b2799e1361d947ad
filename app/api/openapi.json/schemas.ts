import * as z from 'zod';
import { basisSchema } from '@/lib/basis';
import { INFLUENCES } from '@/lib/region/ranking-types';
import { JOB_STATES } from '@/lib/store/jobs';
import { importChoices } from '../regions/[region]/imports/bodies';
import { newRegion, regionChange } from '../regions/bodies';

/** What the API answers and takes, by name. */
export const SCHEMAS = {
  Problem: z
    .looseObject({ type: z.string(), title: z.string(), status: z.int(), detail: z.string() })
    .describe('RFC 9457'),
  Basis: basisSchema.describe('The terms of comparison; any subset may be given, unknown keys are refused by name'),
  NewRegion: newRegion,
  RegionChange: regionChange,
  Region: z.object({
    slug: z.string(),
    name: z.string(),
    invented: z.boolean().describe('true for made-up data'),
    basis: z.looseObject({}).describe('the region’s own basis, whole'),
    tileUrl: z.string().nullable(),
    tileAttribution: z.string().nullable(),
  }),
  RegionSummary: z.object({
    id: z.int(),
    slug: z.string(),
    name: z.string(),
    invented: z.boolean(),
    stations: z.int(),
    records: z.int().describe('stations with a record of daily flows'),
    firstYear: z.int().nullable(),
    lastYear: z.int().nullable(),
  }),
  Station: z.object({
    station_code: z.string(),
    station_name: z.string(),
    river: z.string(),
    drainage_area_km2: z.number().nullable(),
    influence: z.enum(INFLUENCES),
  }),
  Layer: z.object({ id: z.int(), name: z.string(), kind: z.string() }),
  Job: z.object({
    id: z.string(),
    kind: z.string(),
    state: z.enum(JOB_STATES),
    progress: z.looseObject({}).describe('stage, file, rows, bytes, share (0 to 1), rowsPerSecond'),
    result: z.looseObject({}).nullable().describe('what was taken, and of a failed import its problems'),
    error: z.string().nullable(),
    createdAt: z.string(),
    finishedAt: z.string().nullable(),
  }),
  ImportChoices: importChoices,
} as const;
