'use client';
import { useEffect, useState } from 'react';
import { flushSync } from 'react-dom';
import { onThemeChange, readPaperTokens, readTokens } from './tokens.ts';

/** Design tokens resolved for the theme that is shown (see readTokens), read anew when it changes; null before the page is
 *  there.
 *  @param tokens  the same object at every rendering */
export function useTokens<Name extends string>(tokens: Record<Name, string>): Record<Name, string> | null {
  const [palette, setPalette] = useState<Record<Name, string> | null>(null);
  useEffect(() => {
    const read = () => setPalette(readTokens(tokens));
    // ink on paper: drawn before the printer looks, so at once and not at the next frame
    const print = () => flushSync(() => setPalette(readPaperTokens(tokens)));
    read();
    const stop = onThemeChange(read);
    window.addEventListener('beforeprint', print);
    window.addEventListener('afterprint', read);
    return () => {
      stop();
      window.removeEventListener('beforeprint', print);
      window.removeEventListener('afterprint', read);
    };
  }, [tokens]);
  return palette;
}

/** The page's typeface, as a canvas names it. */
export const CANVAS_FONT = '"Inter Variable", system-ui, sans-serif';
