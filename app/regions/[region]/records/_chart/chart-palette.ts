'use client';
import { useEffect, useState } from 'react';
import { onThemeChange, readTokens } from '@/app/components/canvas/tokens';

const TOKENS = {
  paper: '--paper',
  ink: '--ink',
  ink2: '--ink-2',
  ink3: '--ink-3',
  edge: '--edge',
  rule: '--rule',
  full: '--coverage-full',
  part: '--coverage-part',
  alert: '--dry-fill',
  blue: '--blue',
  wash: '--blue-wash',
} as const;

export type ChartPalette = Record<keyof typeof TOKENS, string>;

/** The colours of the theme that is shown, read anew when it changes; null before the page is there. */
export function useChartPalette(): ChartPalette | null {
  const [palette, setPalette] = useState<ChartPalette | null>(null);
  useEffect(() => {
    const read = () => setPalette(readTokens(TOKENS));
    read();
    return onThemeChange(read);
  }, []);
  return palette;
}

export const CHART_FONT = '"Inter Variable", system-ui, sans-serif';
