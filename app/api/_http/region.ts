import type { ResolvedBasis } from '@/lib/basis';
import type { Provenance } from '@/lib/export/provenance';
import { regionDataHash } from '@/lib/store/records';
import { getRegion, type RegionRow } from '@/lib/store/regions';
import { Problem } from './problem';

/** The region that an address names.
 *  @throws Problem 'not-found' */
export async function regionOf({ region: slug }: { region: string }): Promise<RegionRow> {
  const region = await getRegion(slug);
  if (!region) throw new Problem('not-found', `There is no region "${slug}".`);
  return region;
}

/** What a product of a region rests on. */
export async function provenanceOf(
  region: RegionRow,
  basis: ResolvedBasis,
  warnings: readonly string[] = [],
): Promise<Provenance> {
  const { id, slug, name, invented } = region;
  return { region: { slug, name, invented }, basis, dataHash: await regionDataHash(id), warnings };
}
