import * as z from 'zod';
import { parseIsoDate } from '../../calendar/day.ts';
import { FLOW_UNITS } from '../../series/flow-units.ts';
import { QUANTITIES } from '../../series/quantities.ts';
import { CHANGE_KINDS, NAMED_FLOW_KINDS } from '../../series/station-history.ts';

const change = z.strictObject({
  date: z.string().refine((date) => !Number.isNaN(parseIsoDate(date))),
  kind: z.enum(CHANGE_KINDS),
  note: z.string().default(''),
});

const namedFlow = z.strictObject({
  name: z.string().min(1),
  kind: z.enum(NAMED_FLOW_KINDS),
  value: z.number(),
  unit: z.enum(FLOW_UNITS),
  months: z.array(z.int().min(1).max(12)).min(1).nullable().default(null),
});

const recipe = z.strictObject({
  quantity: z.enum(QUANTITIES),
  terms: z.array(z.strictObject({ code: z.string().min(1), factor: z.number(), lagDays: z.int() })).min(1),
  note: z.string().default(''),
});

/** What a registry may give as JSON in one field, as an exported region has it. */
export const HISTORY_JSON = {
  changes: z.array(change),
  namedFlows: z.array(namedFlow),
  derived: recipe.nullable(),
};

/** The JSON of a field; undefined when it is none. */
export function parseJsonField(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    if (!(cause instanceof SyntaxError)) throw cause;
    return undefined;
  }
}
