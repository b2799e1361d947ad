import * as z from 'zod';

export const checkOrder = z.strictObject({
  stations: z.array(z.string()).min(1).optional().describe('codes of the stations to check; all by default'),
});
