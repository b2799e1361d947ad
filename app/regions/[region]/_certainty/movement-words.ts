import { count, fixed } from '@/app/components/format';
import type { RankingMovement } from '@/lib/region/window-types';

/** What the other terms did to the order, in one sentence. `before` of the movement is on the region's own terms.
 *  Example: "Against the region’s own terms, 28 of 33 stations ranked in both keep within a tenth of the places; Ambry at
 *  Sallow moved furthest, 9 places up." */
export function movementWords({ rankedBoth, movedFar, movements }: RankingMovement): string {
  if (rankedBoth === 0) return 'No station is ranked both on these and on the region’s own terms.';
  const start = 'Against the region’s own terms, ';
  const [furthest] = movements;
  if (!furthest?.moved) {
    return `${start}${rankedBoth === 1 ? 'the one station ranked in both keeps its place' : `all ${fixed(rankedBoth)} stations ranked in both keep their places`}.`;
  }
  const keep = rankedBoth - movedFar;
  const who = `${fixed(keep)} of ${fixed(rankedBoth)} stations ranked in both ${keep === 1 ? 'keeps' : 'keep'} within a tenth of the places`;
  return `${start}${who}; ${furthest.name} moved furthest, ${count(Math.abs(furthest.moved), 'place')} ${furthest.moved > 0 ? 'up' : 'down'}.`;
}
