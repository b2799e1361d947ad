import { listRegions } from '../lib/store/regions.ts';
import { DEMO_SEED, generateRegion } from './generate.ts';
import { storeRegion } from './store-region.ts';

/** Makes the demo region, if the database holds no region at all. The database must be there and up to date.
 *  @returns slug of the region it made; null when there was one already */
export async function seedDemo(): Promise<string | null> {
  if ((await listRegions()).length > 0) return null;
  const region = generateRegion({ seed: DEMO_SEED, furnished: true });
  return storeRegion(region, { name: region.name });
}
