'use client';
import { createContext, type ReactNode, useContext } from 'react';
import { type CertaintyAnswer, useCertainty } from './use-certainty.ts';

const Certain = createContext<CertaintyAnswer | null>(null);

interface Props {
  slug: string;
  /** the basis in force, as URL text */
  terms: string;
  /** stations that are ranked or drying */
  tested: number;
  children: ReactNode;
}

/** Asks once how sure the places of a region are, for all parts of a page that speak of it. */
export function CertaintyProvider({ slug, terms, tested, children }: Props) {
  return <Certain value={useCertainty(slug, terms, tested)}>{children}</Certain>;
}

/** @throws RangeError outside a CertaintyProvider */
export function useCertaintyOfPage(): CertaintyAnswer {
  const answer = useContext(Certain);
  if (!answer) throw new RangeError('useCertaintyOfPage: no CertaintyProvider stands around the part');
  return answer;
}
