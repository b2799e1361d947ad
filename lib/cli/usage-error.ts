import { BasisError } from '../basis.ts';

/** Thrown for a command line that cannot be followed: exit 2. The message says what is wrong and what would do. */
export class UsageError extends Error {
  override name = 'UsageError';
}

/** Whether a failure lies in the words given and not in the data: ours, a refused basis, or one of node:util parseArgs. */
export function isUsageError(error: unknown): boolean {
  return error instanceof UsageError || error instanceof BasisError || isParseArgsError(error);
}

function isParseArgsError(error: unknown): boolean {
  return error instanceof TypeError && 'code' in error && String(error.code).startsWith('ERR_PARSE_ARGS_');
}
