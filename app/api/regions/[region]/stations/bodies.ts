import * as z from 'zod';
import { INFLUENCES } from '@/lib/region/ranking-types';
import { FLOW_UNITS } from '@/lib/series/flow-units';
import { QUANTITIES } from '@/lib/series/quantities';
import { CHANGE_KINDS, NAMED_FLOW_KINDS } from '@/lib/series/station-history';

const change = z.strictObject({
  date: z.string().describe('YYYY-MM-DD'),
  kind: z.enum(CHANGE_KINDS),
  note: z.string().default(''),
});

const namedFlow = z.strictObject({
  name: z.string(),
  kind: z.enum(NAMED_FLOW_KINDS),
  value: z.number().describe('in unit'),
  unit: z.enum(FLOW_UNITS),
  months: z.array(z.int()).nullable().default(null).describe('1 to 12; null: all year'),
});

const recipe = z.strictObject({
  quantity: z.enum(QUANTITIES).default('flow'),
  terms: z.array(
    z.strictObject({
      code: z.string().describe('a station of the region'),
      factor: z.number().default(1).describe('-1 takes away'),
      lagDays: z.int().default(0).describe('the value of so many days before is used'),
    }),
  ),
  note: z.string().default(''),
});

/** What can be changed of a station; a key that is left out stays as it is. */
export const stationPatch = z
  .strictObject({
    name: z.string(),
    river: z.string(),
    latitude: z.number().nullable(),
    longitude: z.number().nullable(),
    areaKm2: z.number().nullable(),
    influence: z.enum(INFLUENCES),
    changes: z.array(change).max(1000).describe('all dated changes'),
    namedFlows: z.array(namedFlow).max(1000).describe('all flows that mean something at the station'),
    notes: z.string(),
    derived: recipe.nullable().describe('how its record comes from others; null for a measured station'),
  })
  .partial();

/** A station made by hand. */
export const newStation = stationPatch.extend({ code: z.string().describe('text: leading zeros count') });
