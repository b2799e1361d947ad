import { THEME_EVENT } from '../theme.ts';

/** Design tokens resolved for the theme that is shown, under names of one's own. A canvas cannot read light-dark(): an
 *  element wears each token in turn and its computed colour is taken.
 *  Example: readTokens({ ink: '--ink' }) → { ink: 'rgb(27, 36, 48)' } */
export function readTokens<Name extends string>(tokens: Record<Name, string>): Record<Name, string> {
  const probe = document.createElement('span');
  probe.hidden = true;
  document.body.append(probe);
  const style = getComputedStyle(probe);
  const entries = Object.entries<string>(tokens).map(([name, token]) => {
    probe.style.color = `var(${token})`;
    return [name, style.color];
  });
  probe.remove();
  return Object.fromEntries(entries) as Record<Name, string>;
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

/** As `readTokens`, for paper, which is light whatever theme is shown. The root wears the light theme meanwhile: tokens are
 *  resolved there. */
export function readPaperTokens<Name extends string>(tokens: Record<Name, string>): Record<Name, string> {
  const root = document.documentElement;
  const chosen = root.getAttribute('data-theme');
  root.setAttribute('data-theme', 'light');
  const read = readTokens(tokens);
  if (chosen === null) root.removeAttribute('data-theme');
  else root.setAttribute('data-theme', chosen);
  return read;
}
