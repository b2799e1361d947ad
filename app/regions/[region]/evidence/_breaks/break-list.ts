/** Chosen breaks as they stand in an address: first low-flow years after them, rising, with commas between. */

export const MOST_BREAKS = 5;

const isYear = (year: number): boolean => Number.isInteger(year) && year >= 1000 && year <= 9999;

/** Years that cannot be read are left out; none left: no breaks are chosen. Example: "2005,1990,x" → [1990, 2005] */
export function breaksFromText(text: string | null): number[] {
  if (text === null) return [];
  const years = text.split(',').map(Number).filter(isYear);
  return [...new Set(years)].sort((a, b) => a - b).slice(0, MOST_BREAKS);
}

/** Null for none, so that the address says nothing. */
export function breaksToText(years: readonly number[]): string | null {
  return years.length === 0 ? null : breaksFromText(years.join(',')).join(',');
}
