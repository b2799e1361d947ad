import { type Basis, BasisError } from '@/lib/basis';
import { rankingOf } from '@/lib/jobs/ranking';
import type { Ranking } from '@/lib/region/ranking-types';
import type { RegionRow } from '@/lib/store/regions';

/** The ranking as asked. A basis that only turns out unusable on these records (a season that does not fit into the low-flow
 *  year they ask for) gives way to the region's own, and `problem` says so. */
export async function rankingOrRegionsOwn(
  region: RegionRow,
  basis: Basis,
  basisProblem: string | null,
): Promise<{ ranking: Ranking; problem: string | null }> {
  try {
    return { ranking: (await rankingOf(region, basis)).ranking, problem: basisProblem };
  } catch (error) {
    if (!(error instanceof BasisError) || basis === region.basis) throw error;
    return { ranking: (await rankingOf(region, region.basis)).ranking, problem: error.message };
  }
}
