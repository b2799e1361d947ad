import type { Basis, ResolvedBasis } from '../basis.ts';
import { rankingMovement } from '../region/movement.ts';
import type { RankingMovement } from '../region/window-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { rankingOf } from './ranking.ts';
import { derivedKey } from './result-key.ts';

/** A region's ranking under one basis against that under another.
 *  @param basis    the terms at hand
 *  @param against  the other terms
 *  @throws BasisError when a season does not fit into its low-flow year */
export async function movementOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  against: Basis,
): Promise<{ movement: RankingMovement; basis: ResolvedBasis; against: ResolvedBasis; key: string }> {
  const after = await rankingOf(region, basis);
  const before = await rankingOf(region, against);
  return {
    movement: rankingMovement(before.ranking, after.ranking),
    basis: after.ranking.basis,
    against: before.ranking.basis,
    key: derivedKey('movement', after.key, before.key),
  };
}
