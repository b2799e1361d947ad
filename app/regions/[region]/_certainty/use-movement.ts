'use client';
import { apiHref } from '@/app/components/links';
import { type Answer, useAnswer } from '@/app/components/use-answer';
import type { RankingMovement } from '@/lib/region/window-types';

/** Terms that only change how figures are shown. */
const SHOWN_ONLY: readonly string[] = ['units', 'normalise'];

/** How the ranking moved against the region's own terms; nothing is asked while these are those.
 *  @param terms  the basis in force, as URL text: what differs from the region's own */
export function useMovement(slug: string, terms: string): Answer<RankingMovement> {
  const differs = [...new URLSearchParams(terms).keys()].some((key) => !SHOWN_ONLY.includes(key));
  return useAnswer<RankingMovement>(differs ? apiHref(slug, 'movement', terms) : null);
}
