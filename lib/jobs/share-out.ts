/** Stations per task: small enough that no thread waits long for another's last task, large enough that sending one
 *  costs nothing beside computing it. */
export const STATIONS_PER_TASK = 50;

/** Splits a list into consecutive chunks of at most `size`. Example: [1, 2, 3], 2 → [[1, 2], [3]] */
export function chunksOf<Item>(items: readonly Item[], size: number = STATIONS_PER_TASK): Item[][] {
  const chunks: Item[][] = [];
  for (let from = 0; from < items.length; from += size) chunks.push(items.slice(from, from + size));
  return chunks;
}
