import { readTokens } from '@/app/components/canvas/tokens';

/** The tokens that are drawn on canvas, resolved for the theme that is shown. */
export interface Palette {
  paper: string;
  falling: string;
  rising: string;
  level: string;
  blue: string;
  water: string;
  catchment: string;
  catchmentEdge: string;
  land: string;
  border: string;
}

export const MAP_TOKENS: Record<keyof Palette, string> = {
  paper: '--paper',
  falling: '--dry-fill',
  rising: '--wet-fill',
  level: '--level',
  blue: '--blue',
  water: '--water',
  catchment: '--catchment',
  catchmentEdge: '--catchment-edge',
  land: '--paper-land',
  border: '--rule-strong',
};

export const readPalette = (): Palette => readTokens(MAP_TOKENS);
