import type { MapRow } from './map-row.ts';
import type { Tab } from './map-state.ts';

/** Letters without marks, lower case: "Ljubljanica Vrhnıka" is found by "vrhn", "Krška" by "krska". */
export const fold = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/\p{Mark}/gu, '')
    .toLowerCase();

/** Whether a station answers a search: every word stands in its code, name or river. */
export function matcher(search: string): (row: MapRow) => boolean {
  const words = fold(search).split(/\s+/).filter(Boolean);
  if (words.length === 0) return () => true;
  return (row) => {
    const text = fold(`${row.code} ${row.name} ${row.river}`);
    return words.every((word) => text.includes(word));
  };
}

export const tabOf = (row: MapRow): Tab => (row.rank !== null ? 'ranked' : row.drying ? 'drying' : 'unranked');

export const hasPlace = (row: MapRow): row is MapRow & { latitude: number; longitude: number } =>
  row.latitude !== null && row.longitude !== null;
