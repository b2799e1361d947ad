import * as z from 'zod';

/** A mapping to be kept under a name. */
export const mappingToKeep = z.strictObject({
  name: z.string().trim().min(1, 'a mapping needs a name').max(200).describe('a mapping of this name is replaced'),
  mapping: z.record(z.string(), z.unknown()).describe('any keys of a mapping, as in the import command'),
});
