'use client';
import { CANVAS_FONT, useTokens } from '@/app/components/canvas/use-tokens';

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
export const useChartPalette = (): ChartPalette | null => useTokens(TOKENS);

export const CHART_FONT = CANVAS_FONT;
