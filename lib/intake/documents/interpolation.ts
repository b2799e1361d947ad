import type { StampMeaning } from './time-stamp.ts';

/** What a time stamp means under an interpolation type: the end or the start of the value's interval, or a moment. */
export function meaningOf(interpolation: string): StampMeaning {
  if (/prec(?![a-z])|prece/i.test(interpolation)) return 'end';
  return /succ|follow/i.test(interpolation) ? 'start' : 'instant';
}

/** Largest or smallest values of their interval, in words; empty for means and moments. */
export function extremeOf(interpolation: string): string {
  return /\b(?:max|min)/i.test(interpolation) ? interpolation : '';
}
