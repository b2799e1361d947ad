import * as z from 'zod';
import { parseBasis } from '../basis.ts';
import { LINK_SOURCES } from '../region/link-suggestions.ts';
import { QUANTITIES } from '../series/quantities.ts';
import { ARCHIVE_FORMAT } from '../store/archived-region.ts';
import { OVERLAP_RULES } from '../store/lay-parts.ts';
import { LAYER_KINDS } from '../store/layer-kinds.ts';
import { REJECTED } from '../store/links.ts';
import { MARK_KINDS } from '../store/marks-on-flags.ts';

const text = z.string().max(10_000);
const name = z.string().min(1).max(200);
const object = z.record(z.string(), z.unknown());
/** A subset of the basis's keys, each with a value that it takes. */
const basis = object.transform((keys, context) => {
  try {
    const whole = parseBasis(keys) as unknown as Record<string, unknown>;
    return Object.fromEntries(Object.keys(keys).map((key) => [key, whole[key]]));
  } catch (error) {
    context.addIssue({ code: 'custom', message: error instanceof Error ? error.message : String(error) });
    return z.NEVER;
  }
});

/** region.json of an archive, as far as it is taken over. */
export const regionDocumentSchema = z.object({
  format: z.literal(ARCHIVE_FORMAT),
  version: z.int().min(1),
  name,
  invented: z.boolean(),
  basis,
  tiles: z.object({ url: z.string().regex(/^https?:\/\/\S+$/), attribution: text }).nullable(),
  bases: z.array(z.object({ name, basis })),
  mappings: z.array(z.object({ name, mapping: object })),
  links: z.array(z.object({ upstream: name, downstream: name, source: z.enum([...LINK_SOURCES, REJECTED]) })),
  marks: z.array(
    z.object({
      ...{ station: name, quantity: z.enum(QUANTITIES), firstDay: z.int(), lastDay: z.int() },
      ...{ kind: z.enum(MARK_KINDS), reason: text.min(1), by: text, createdAt: z.iso.datetime({ offset: true }) },
    }),
  ),
  layers: z.array(z.object({ file: text, name, kind: z.enum(LAYER_KINDS) })),
});

/** imports.json of an archive. */
export const importsDocumentSchema = z.array(
  z.object({
    ...{ fileName: name, kind: z.enum(['flows', 'registry', 'layer']), sha256: z.string().max(64) },
    ...{
      createdAt: z.iso.datetime({ offset: true }),
      by: text,
      rule: z.enum(OVERLAP_RULES),
      layout: name.or(z.literal('')),
    },
    ...{ unit: text, rows: z.int().min(0), accepted: z.int().min(0), rejected: z.int().min(0) },
    ...{ mapping: z.unknown(), file: text.nullable(), read: object.nullable() },
  }),
);
