import type * as z from 'zod';

/** What is wrong with the text of a parameter: what would do, and what was given.
 *  Example: k=0 → `must be at least 1, not "0"` */
export function parameterWords(issue: z.core.$ZodIssue, given: string | undefined): string {
  if (issue.code === 'custom' || given === undefined) return issue.message;
  const wanted = wantedWords(issue);
  return wanted === null ? `${issue.message}, not "${given}"` : `must be ${wanted}, not "${given}"`;
}

function wantedWords(issue: z.core.$ZodIssue): string | null {
  switch (issue.code) {
    case 'invalid_value':
      return listed(issue.values.map(String));
    case 'invalid_type':
      if (issue.expected === 'int') return 'a whole number';
      return issue.expected === 'number' ? 'a number' : null;
    case 'too_small':
      return issue.origin === 'number' ? `at least ${issue.minimum}` : null;
    case 'too_big':
      return issue.origin === 'number' ? `at most ${issue.maximum}` : null;
    default:
      return null;
  }
}

const listed = (names: readonly string[]): string =>
  names.length < 2 ? names.join() : `${names.slice(0, -1).join(', ')} or ${names[names.length - 1]}`;
