import * as z from 'zod';

export const newRegion = z.strictObject({
  name: z.string().trim().min(1, 'a region needs a name').max(200).describe('as shown; its slug makes the address'),
});

export const regionChange = z
  .strictObject({
    name: z.string().trim().min(1, 'a region needs a name').max(200).describe('changes the address as well'),
    tiles: z
      .union([z.null(), z.strictObject({ url: z.string().max(2000), attribution: z.string().max(1000) })])
      .describe('map background: an http(s) template with {z}, {x}, {y}, and who made it; null for none'),
    basis: z
      .record(z.string(), z.unknown())
      .describe('keys of the region’s own basis to change; the others stay as they are'),
  })
  .partial();
