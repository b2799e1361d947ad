import { significant } from '@/app/components/format';
import type { MinimaPoint } from './minima-points';

/** One year in words: value, date, what is missing and why it is not used. */
export function readingText(point: MinimaPoint, factor: number, unit: string, days: number): string {
  const value = point.minimum === null ? 'no minimum' : `${significant(point.minimum * factor)} ${unit}`;
  const parts = [
    `${point.label}: ${point.usable || point.minimum === null ? value : `at most ${value}`}`,
    point.date ? `, in the ${days === 1 ? 'day' : `${days} days`} to ${point.date}` : '',
    `; ${point.missingDays === 1 ? '1 day' : `${point.missingDays} days`} missing`,
    point.flaggedDays > 0 ? `, ${point.flaggedDays} flagged` : '',
    point.reason ? `. Not used: ${point.reason}` : '',
    point.usable && !point.used ? '. Usable, but not among the years compared' : '',
  ];
  return parts.join('');
}
