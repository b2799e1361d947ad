import * as z from 'zod';
import { FINDING_KINDS } from '@/lib/checks/finding';
import { FINDING_STATES } from '@/lib/store/findings';

export const findingParameters = {
  format: z.enum(['json', 'csv']).default('json'),
  station: z.string().optional().describe('code of a station; all by default'),
  kind: z.enum(FINDING_KINDS).optional().describe('which check'),
  state: z.enum(FINDING_STATES).optional().describe('open, or how a person answered it'),
};
