import { useSyncExternalStore } from 'react';
import {
  getTheme,
  getThemeChoice,
  setThemeChoice,
  subscribeTheme,
  type Theme,
  type ThemeChoice,
} from './theme.ts';

/** The theme shown now, the choice behind it, and how to change it. Canvases redraw when `theme` changes. */
export function useTheme(): { theme: Theme; choice: ThemeChoice; setChoice: (choice: ThemeChoice) => void } {
  const theme = useSyncExternalStore(subscribeTheme, getTheme);
  const choice = useSyncExternalStore(subscribeTheme, getThemeChoice);
  return { theme, choice, setChoice: setThemeChoice };
}
