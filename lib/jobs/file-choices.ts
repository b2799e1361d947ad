import * as z from 'zod';
import { CORRECTIONS } from '../intake/types.ts';
import { AREA_UNITS } from '../series/area-units.ts';
import { UNITS } from '../series/quantities.ts';
import { FILE_KINDS } from './import-types.ts';

/** What a person may say about one file, as it comes in a request or a file of choices. The mapping's own keys are looked
 *  at where the file is read. */
export const fileChoices = z
  .strictObject({
    kind: z.enum(FILE_KINDS).describe('what the file is; else recognised by what it holds'),
    mapping: z
      .record(z.string(), z.unknown())
      .describe('how the file is to be read, key by key, as in the import command'),
    unit: z.enum(UNITS).describe('unit of the values'),
    station: z.string().min(1).describe('code of the station of a file that names none'),
    matchCodes: z.boolean().describe('take codes that differ by case or leading zeros for those of the station list'),
    areaUnit: z.enum(AREA_UNITS).describe('of the areas in a station list that does not name it'),
    corrections: z.array(z.enum(CORRECTIONS)).describe('of the coordinates in a station list'),
  })
  .partial();
