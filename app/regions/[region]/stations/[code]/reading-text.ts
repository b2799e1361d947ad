import { type IndexScale, valueText } from './index-scale.ts';
import type { MinimaPoint } from './minima-points';

/** One year in words: value, date, what is missing and why it is not used. */
export function readingText(point: MinimaPoint, scale: IndexScale, days: number): string {
  const value = valueText(point.value, scale);
  const isOfLow = scale.index === 'minimum' || scale.index === 'minimum-date';
  const parts = [
    `${point.label}: ${point.usable || point.value === null ? value : `at most ${value}`}`,
    point.date && isOfLow ? `, in the ${days === 1 ? 'day' : `${days} days`} to ${point.date}` : '',
    `; ${point.missingDays === 1 ? '1 day' : `${point.missingDays} days`} missing`,
    point.flaggedDays > 0 ? `, ${point.flaggedDays} flagged` : '',
    point.reason ? `. Not used: ${point.reason}` : '',
    point.usable && !point.used ? '. Usable, but not among the years compared' : '',
  ];
  return parts.join('');
}
