import { readTokens } from '@/app/components/canvas/tokens';

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
export const readChartPalette = (): ChartPalette => readTokens(TOKENS);

export const CHART_FONT = '"Inter Variable", system-ui, sans-serif';
