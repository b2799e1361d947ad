'use client';
import { useSearchParams } from 'next/navigation';
import { percent, shareText } from '@/app/components/format';
import { USUAL_STEEPEST } from '@/lib/region/certainty-types';
import { useCertaintyOfPage } from '../../../_certainty/certainty-context.tsx';
import { amongSteepest } from '../../../_certainty/certainty-view.ts';
import { amongWords } from '../../../_certainty/place-words.ts';
import { spanText } from '../../../_ranking/sureness-cells.tsx';
import { parseSteepest } from '../../../map-state.ts';

/** "of the steepest declines", as the address says it. */
export function useSteepest(): number {
  return parseSteepest(useSearchParams().get('k') ?? '') ?? USUAL_STEEPEST;
}

/** After the place in the ranking: how sure it is. Nothing while that is not known. */
export function PlaceNote({ code }: { code: string }) {
  const { view } = useCertaintyOfPage();
  const k = useSteepest();
  const span = view?.spans.get(code);
  if (!view || !span) return null;
  return (
    <>
      {`, place ${spanText(span.rankLow, span.rankHigh)} with ${percent(0.9)} certainty`}
      {`, ${amongWords(k)} with a probability of ${shareText(amongSteepest(view, code, k))}`}
    </>
  );
}
