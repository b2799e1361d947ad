'use client';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useTransition } from 'react';

/** What a link leaves unsaid, as it stands in an address. */
export interface OwnTerms {
  period: string;
  minYears: string;
  minCoverage: string;
}

/** Writes keys of the basis into the address, beside all else that stands there; one that is the region's own is left
 *  out. */
export function useBasisKeys(own: OwnTerms): { pending: boolean; set(keys: Partial<OwnTerms>): void } {
  const router = useRouter();
  const path = usePathname();
  const query = useSearchParams();
  const [pending, startTransition] = useTransition();
  const set = (keys: Partial<OwnTerms>) => {
    const next = new URLSearchParams(query);
    for (const [key, value] of Object.entries(keys) as [keyof OwnTerms, string][]) {
      if (value === own[key]) next.delete(key);
      else next.set(key, value);
    }
    const text = next.toString().replaceAll('%2C', ',');
    startTransition(() => router.push(text ? `${path}?${text}` : path, { scroll: false }));
  };
  return { pending, set };
}
