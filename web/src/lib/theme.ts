/** The reader's theme: light, dark, or as the system. Kept in this browser; `public/theme.js` applies it before the first paint. */
export const themes = ['system', 'light', 'dark'] as const;
export type Theme = (typeof themes)[number];

export const themeWords: Readonly<Record<Theme, string>> = { system: 'As the system', light: 'Light', dark: 'Dark' };

const storageKey = 'evenbeam.theme';

export const readTheme = (): Theme => {
  try {
    const kept = localStorage.getItem(storageKey);
    return kept === 'light' || kept === 'dark' ? kept : 'system';
  } catch {
    return 'system'; // storage closed to this page
  }
};

export const applyTheme = (theme: Theme): void => {
  if (theme === 'system') document.documentElement.removeAttribute('data-theme');
  else document.documentElement.setAttribute('data-theme', theme);
  try {
    if (theme === 'system') localStorage.removeItem(storageKey);
    else localStorage.setItem(storageKey, theme);
  } catch {
    // The choice then lasts for this page only.
  }
};
