'use client';
import { useEffect, useState } from 'react';
import { onThemeChange, readTokens } from './tokens.ts';

/** Design tokens resolved for the theme that is shown (see readTokens), read anew when it changes; null before the page is
 *  there.
 *  @param tokens  the same object at every rendering */
export function useTokens<Name extends string>(tokens: Record<Name, string>): Record<Name, string> | null {
  const [palette, setPalette] = useState<Record<Name, string> | null>(null);
  useEffect(() => {
    const read = () => setPalette(readTokens(tokens));
    read();
    return onThemeChange(read);
  }, [tokens]);
  return palette;
}

/** The page's typeface, as a canvas names it. */
export const CANVAS_FONT = '"Inter Variable", system-ui, sans-serif';
