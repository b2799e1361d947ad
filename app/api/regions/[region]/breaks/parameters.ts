import * as z from 'zod';
import { plainFormatParameter } from '@/app/api/_http/plain-table';
import { BREAK_CHOICE_HELP, type BreakChoice, parseBreakChoice } from '@/lib/region/break-choice';

export const breaksParameters = {
  ...plainFormatParameter,
  breaks: z
    .string()
    .default('changes')
    .transform((text, context): BreakChoice => {
      const choice = parseBreakChoice(text);
      if (choice) return choice;
      context.addIssue({ code: 'custom', message: `must be ${BREAK_CHOICE_HELP}; not "${text}"` });
      return z.NEVER;
    })
    .describe(BREAK_CHOICE_HELP),
};
