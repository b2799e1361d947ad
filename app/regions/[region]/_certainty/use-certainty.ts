'use client';
import { useMemo } from 'react';
import { apiHref } from '@/app/components/links';
import { type LongResult, useLongResult } from '@/app/components/use-long-result';
import type { Certainty } from '@/lib/region/certainty-types';
import { type CertaintyView, certaintyView } from './certainty-view.ts';

export interface CertaintyAnswer extends Omit<LongResult<Certainty>, 'value' | 'valueOf'> {
  /** null until it is there: the ranking stands without */
  view: CertaintyView | null;
}

/** How sure the places of a region's ranking are. Asked for when the page is alive.
 *  @param terms   the basis in force, as URL text
 *  @param tested  stations that are ranked or drying; with none there is nothing to ask */
export function useCertainty(slug: string, terms: string, tested: number): CertaintyAnswer {
  const address = tested === 0 ? null : apiHref(slug, 'certainty', terms);
  const {
    value,
    valueOf: answered,
    problem,
    pending,
    progress,
    cancelling,
    cancelled,
    cancel,
    retry,
  } = useLongResult<Certainty>(address);
  // that of other terms would say something untrue of these
  const view = useMemo(
    () => (value !== null && answered === address ? certaintyView(value) : null),
    [value, answered, address],
  );
  // the same as long as nothing changed: lists of thousands hang on it
  return useMemo(
    () => ({ view, problem, pending, progress, cancelling, cancelled, cancel, retry }),
    [view, problem, pending, progress, cancelling, cancelled, cancel, retry],
  );
}
