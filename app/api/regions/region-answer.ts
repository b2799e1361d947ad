import type { RegionRow } from '@/lib/store/regions';

/** A region as the API shows it: without the number of its row. */
export function regionAnswer({ slug, name, invented, basis, tileUrl, tileAttribution }: RegionRow) {
  return { slug, name, invented, basis, tileUrl, tileAttribution };
}
