/** What a person chose on this browser; `system` follows the operating system. */
export const themeOptions = [
  { key: 'system', label: 'as the system' },
  { key: 'light', label: 'light' },
  { key: 'dark', label: 'dark' },
] as const;
export type ThemeChoice = (typeof themeOptions)[number]['key'];
export type Theme = 'light' | 'dark';

const key = 'foothold.theme';
const listeners = new Set<() => void>();
const systemDark = () => window.matchMedia('(prefers-color-scheme: dark)');

/** A browser may refuse storage (private window): the choice then lasts as long as the page. */
let unsaved: ThemeChoice | undefined;

export function getThemeChoice(): ThemeChoice {
  if (unsaved !== undefined) return unsaved;
  try {
    const saved = window.localStorage.getItem(key);
    return themeOptions.find(({ key: choice }) => choice === saved)?.key ?? 'system';
  } catch {
    return 'system';
  }
}

export function getTheme(): Theme {
  const choice = getThemeChoice();
  if (choice !== 'system') return choice;
  return systemDark().matches ? 'dark' : 'light';
}

export function setThemeChoice(choice: ThemeChoice): void {
  try {
    window.localStorage.setItem(key, choice);
    unsaved = undefined;
  } catch {
    unsaved = choice;
  }
  changed();
}

export function subscribeTheme(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Puts the theme on `<html data-theme>` and keeps it there as the system or another tab changes it. */
export function startTheme(): void {
  systemDark().addEventListener('change', changed);
  window.addEventListener('storage', (event) => {
    if (event.key === key) changed();
  });
  changed();
}

function changed(): void {
  document.documentElement.dataset.theme = getTheme();
  listeners.forEach((listener) => listener());
}
