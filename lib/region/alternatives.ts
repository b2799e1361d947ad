import type { AlternativeTerms } from './alternative-terms.ts';
import { rankingMovement } from './movement.ts';
import type { Ranking } from './ranking-types.ts';
import type { Alternative } from './window-types.ts';

/** What another choice of a term does to the ranking.
 *  @param atHand  the ranking under the basis as it is
 *  @param other   the one under the other choice; null with `problem` in words where there is none */
export function alternative(
  { term, label, change, current }: AlternativeTerms,
  atHand: Ranking,
  other: Ranking | null,
  problem: string | null = null,
): Alternative {
  const head = { term, label, change, current };
  if (other === null) {
    return { ...head, ranked: 0, falling: 0, rising: 0, tau: null, movedFar: 0, furthest: null, problem };
  }
  const { tau, movedFar, movements } = rankingMovement(atHand, other);
  const { ranked, falling, rising } = other.counts;
  const [first] = movements;
  const furthest = first?.moved ? first : null;
  return { ...head, ranked, falling, rising, tau, movedFar, furthest, problem: null };
}
