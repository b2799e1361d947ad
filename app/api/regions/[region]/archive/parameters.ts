import * as z from 'zod';

export const archiveParameters = {
  waterml: z
    .enum(['yes', 'no'])
    .default('yes')
    .describe('no leaves out the WaterML documents, which take the most room'),
};
