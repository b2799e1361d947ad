import { fixed } from '../format.ts';

/** Example: 1_234_567 → "1.2 MB" */
export function sizeText(bytes: number): string {
  if (bytes < 1000) return `${fixed(bytes)} bytes`;
  const units = ['kB', 'MB', 'GB', 'TB'];
  let size = bytes / 1000;
  let unit = 0;
  while (size >= 999.5 && unit < units.length - 1) {
    size /= 1000;
    unit++;
  }
  return `${fixed(size, size < 10 ? 1 : 0)} ${units[unit]}`;
}
