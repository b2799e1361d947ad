'use client';
import { useSearchParams } from 'next/navigation';
import { apiHref, BASIS_PARAMETERS } from '@/app/components/links';
import { type Answer, useAnswer } from '@/app/components/use-answer';
import type { RankingMovement } from '@/lib/region/window-types';

/** Terms that only change how figures are shown. */
const SHOWN_ONLY: readonly string[] = ['units', 'normalise'];

/** How the ranking moved against the region's own terms; nothing is asked while the address has those. */
export function useMovement(slug: string): Answer<RankingMovement> {
  const query = useSearchParams();
  const differs = BASIS_PARAMETERS.some((key) => query.has(key) && !SHOWN_ONLY.includes(key));
  return useAnswer<RankingMovement>(differs ? apiHref(slug, 'movement', query) : null);
}
