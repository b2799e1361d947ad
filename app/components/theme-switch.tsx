'use client';
import { useEffect, useState } from 'react';
import { applyTheme, currentTheme, THEMES, type Theme } from './theme.ts';
import styles from './theme-switch.module.css';

const NAMES: Record<Theme, string> = { system: 'as the device', light: 'light', dark: 'dark' };

/** One button that goes through device, light and dark. */
export function ThemeSwitch() {
  const [theme, setTheme] = useState<Theme>('system');
  useEffect(() => setTheme(currentTheme()), []);
  const next = THEMES[(THEMES.indexOf(theme) + 1) % THEMES.length];
  return (
    <button
      type="button"
      className={styles.button}
      aria-label={`Theme: ${NAMES[theme]}. Change to ${NAMES[next]}`}
      title={`Theme: ${NAMES[theme]}`}
      onClick={() => {
        applyTheme(next);
        setTheme(next);
      }}
    >
      <svg viewBox="0 0 20 20" width="18" height="18" aria-hidden="true">
        <circle cx="10" cy="10" r="7" fill={theme === 'dark' ? 'currentColor' : 'none'} stroke="currentColor" />
        {theme === 'system' && <path d="M10 3a7 7 0 0 1 0 14z" fill="currentColor" />}
        {theme === 'light' && <circle cx="10" cy="10" r="2.5" fill="currentColor" />}
      </svg>
    </button>
  );
}
