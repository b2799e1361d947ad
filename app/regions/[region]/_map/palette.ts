import { THEME_EVENT } from '@/app/components/theme';

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

const TOKENS: Record<keyof Palette, string> = {
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

/** A canvas cannot read light-dark(): an element wears each token in turn and its computed colour is taken. */
export function readPalette(): Palette {
  const probe = document.createElement('span');
  probe.hidden = true;
  document.body.append(probe);
  const style = getComputedStyle(probe);
  const entries = Object.entries(TOKENS).map(([name, token]) => {
    probe.style.color = `var(${token})`;
    return [name, style.color];
  });
  probe.remove();
  return Object.fromEntries(entries) as Record<keyof Palette, string>;
}

/** Calls back when the device or the reader changes the theme. @returns how to stop */
export function onThemeChange(listener: () => void): () => void {
  const device = matchMedia('(prefers-color-scheme: dark)');
  device.addEventListener('change', listener);
  window.addEventListener(THEME_EVENT, listener);
  return () => {
    device.removeEventListener('change', listener);
    window.removeEventListener(THEME_EVENT, listener);
  };
}
