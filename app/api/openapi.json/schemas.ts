import * as z from 'zod';
import { basisSchema } from '@/lib/basis';
import { FINDING_KINDS } from '@/lib/checks/finding';
import { LAYOUTS, NEEDS } from '@/lib/intake/types';
import { FILE_KINDS } from '@/lib/jobs/import-types';
import { LINK_SOURCES } from '@/lib/region/link-suggestions';
import { INFLUENCES } from '@/lib/region/ranking-types';
import { QUANTITIES, UNITS } from '@/lib/series/quantities';
import { FINDING_STATES } from '@/lib/store/findings';
import { JOB_STATES } from '@/lib/store/jobs';
import { MARK_KINDS } from '@/lib/store/marks-on-flags';
import { checkOrder } from '../regions/[region]/checks/bodies';
import { fileChoices, importChoices } from '../regions/[region]/imports/bodies';
import { link, newLinks } from '../regions/[region]/links/bodies';
import { suggestionAnswer } from '../regions/[region]/links/suggested/bodies';
import { mappingToKeep } from '../regions/[region]/mappings/bodies';
import { newMark } from '../regions/[region]/stations/[code]/marks/bodies';
import { newStation, stationPatch } from '../regions/[region]/stations/bodies';
import { newRegion, regionChange } from '../regions/bodies';
import { importOrder, previewOrder, uploadChange } from '../uploads/[upload]/bodies';

const uploadedFile = z.object({
  file: z.string(),
  size: z.int().describe('bytes'),
  state: z.enum(['unseen', 'ready', 'asks', 'unreadable']),
  kind: z.enum(FILE_KINDS).nullable(),
  layout: z.enum(LAYOUTS).nullable(),
  unit: z.enum(UNITS).nullable(),
  stations: z.array(z.string()).describe('codes met in the first rows'),
  count: z.int().nullable().describe('stations of a registry, features of a layer'),
  problem: z.string().nullable(),
  needs: z.array(z.enum(NEEDS)),
  likeness: z.string().nullable().describe('equal for files that are laid out alike'),
  choices: fileChoices,
});

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
  NewStation: newStation,
  StationChange: stationPatch,
  StationFacts: newStation.required(),
  SuggestionAnswer: suggestionAnswer,
  LinkSuggestions: z.object({
    suggested: z.array(
      z.object({
        upstream: z.string(),
        downstream: z.string(),
        source: z.enum(LINK_SOURCES).exclude(['person']),
        reason: z.string(),
      }),
    ),
    rejected: z.array(z.object({ upstream: z.string(), downstream: z.string() })),
    hasRivers: z.boolean().describe('whether the region has a layer of rivers'),
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
  MappingToKeep: mappingToKeep,
  SavedMapping: mappingToKeep.extend({ id: z.int(), createdAt: z.string() }),
  NewLink: newLinks,
  Link: link.extend({ id: z.int() }),
  Upload: z.object({
    id: z.string(),
    region: z.string().nullable().describe('null: its import makes a region'),
    createdAt: z.string(),
    files: z.array(uploadedFile),
    notes: z.array(z.string()).describe('what was passed over in archives'),
    job: z.object({ id: z.string(), state: z.enum(JOB_STATES), dryRun: z.boolean() }).nullable(),
  }),
  UploadedFile: uploadedFile,
  UploadChange: uploadChange,
  PreviewOrder: previewOrder,
  FilePreview: uploadedFile.extend({
    problems: z.array(z.looseObject({ message: z.string() })),
    inspection: z.looseObject({}).nullable().describe('mapping, header, first rows, and what they are understood as'),
    lines: z.array(z.string()).describe('the first lines as they stand in the file'),
    registry: z.looseObject({}).nullable(),
    layer: z.looseObject({}).nullable(),
  }),
  ImportOrder: importOrder,
  CheckOrder: checkOrder,
  Finding: z.object({
    id: z.string().describe('kind and first day: the same after every check that finds it'),
    code: z.string().describe('of the station'),
    quantity: z.enum(QUANTITIES),
    kind: z.enum(FINDING_KINDS),
    first: z.iso.date(),
    last: z.iso.date(),
    days: z.int().describe('days of the stretch that are at fault'),
    detail: z.looseObject({}).describe('the figures behind it, flows in m³/s'),
    state: z.enum(FINDING_STATES),
  }),
  FindingCounts: z.object({
    code: z.string().describe('of the station'),
    counts: z.array(z.object({ kind: z.enum(FINDING_KINDS), state: z.enum(FINDING_STATES), count: z.int() })),
  }),
  NewMark: newMark,
  Mark: z.object({
    id: z.int(),
    code: z.string().describe('of the station'),
    quantity: z.enum(QUANTITIES),
    kind: z.enum(MARK_KINDS),
    first: z.iso.date(),
    last: z.iso.date(),
    reason: z.string(),
    by: z.string(),
    createdAt: z.iso.datetime(),
  }),
} as const;
