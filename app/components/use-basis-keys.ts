'use client';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useTransition } from 'react';

/** Writes keys of the basis into the address, beside all else that stands there; one that is the region's own is left
 *  out.
 *  @param own  the region's own terms as an address would write them */
export function useBasisKeys<Terms extends object>(own: Terms): { pending: boolean; set(keys: Partial<Terms>): void } {
  const router = useRouter();
  const path = usePathname();
  const query = useSearchParams();
  const [pending, startTransition] = useTransition();
  const set = (keys: Partial<Terms>) => {
    const next = new URLSearchParams(query);
    for (const [key, value] of Object.entries(keys) as [keyof Terms & string, string][]) {
      if (value === own[key]) next.delete(key);
      else next.set(key, value);
    }
    const text = next.toString().replaceAll('%2C', ',');
    startTransition(() => router.push(text ? `${path}?${text}` : path, { scroll: false }));
  };
  return { pending, set };
}
