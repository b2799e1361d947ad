import { notFound } from 'next/navigation';
import { type Basis, BasisError, basisFromQuery } from '@/lib/basis';
import { getRegion, type RegionRow } from '@/lib/store/regions';

export type PageQuery = Record<string, string | string[] | undefined>;

export interface PageRequest {
  region: RegionRow;
  /** the region's own basis with what the address changes */
  basis: Basis;
  /** why the address' basis cannot be used; `basis` is then the region's own */
  basisProblem: string | null;
  /** the address' parameters, first value of each */
  query: URLSearchParams;
}

/** What every page of a region starts from. An unknown region answers "not found". */
export async function pageRequest(slug: string, searchParams: PageQuery): Promise<PageRequest> {
  const region = await getRegion(slug);
  if (!region) notFound();
  const query = new URLSearchParams();
  for (const [key, value] of Object.entries(searchParams)) {
    const text = Array.isArray(value) ? value[0] : value;
    if (text !== undefined) query.set(key, text);
  }
  try {
    return { region, basis: basisFromQuery(query, region.basis), basisProblem: null, query };
  } catch (error) {
    if (!(error instanceof BasisError)) throw error;
    return { region, basis: region.basis, basisProblem: error.message, query };
  }
}
