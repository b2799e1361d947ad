/** The reader's choice of theme: kept in the browser, shown as data-theme on <html>; `system` leaves it to the device. */
export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

const THEME_KEY = 'hungerstone.theme';

/** Sets the chosen theme while the page is parsed. No quotes, ampersands or angle brackets: React escapes those. */
export const THEME_SCRIPT = `try{const t=localStorage.getItem(\`${THEME_KEY}\`);if(t===\`light\`||t===\`dark\`)document.documentElement.dataset.theme=t}catch{}`;

/** Shows and keeps a theme. Storage may be refused (private windows); the choice then lasts for the page. */
export function applyTheme(theme: Theme): void {
  if (theme === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = theme;
  try {
    if (theme === 'system') localStorage.removeItem(THEME_KEY);
    else localStorage.setItem(THEME_KEY, theme);
  } catch {
    // the theme is set for this page all the same
  }
  window.dispatchEvent(new Event(THEME_EVENT));
}

/** Fired on window after the theme changed, for figures drawn on canvas. */
export const THEME_EVENT = 'hungerstone:theme';

export function currentTheme(): Theme {
  const shown = document.documentElement.dataset.theme;
  return shown === 'light' || shown === 'dark' ? shown : 'system';
}
