export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

const KEY = 'witness-mark-theme';

export function storedTheme(): Theme {
  const stored = readStored();
  return THEMES.find((theme) => theme === stored) ?? 'system';
}

/** Shows the page in the chosen theme, and remembers the choice in this browser. */
export function chooseTheme(theme: Theme): void {
  try {
    localStorage.setItem(KEY, theme);
  } catch {
    // Storage can be switched off; the choice then lasts as long as the page.
  }
  applyTheme(theme);
}

export function applyTheme(theme: Theme): void {
  if (theme === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = theme;
}

function readStored(): string | null {
  try {
    return localStorage.getItem(KEY);
  } catch {
    return null;
  }
}
