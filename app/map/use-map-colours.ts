import { useMemo } from 'react';
import { useTheme } from '#app/lib/use-theme.ts';
import { readMapColours, type MapColours } from './map-colours.ts';

/** The map's colours under the theme shown now; the same object as long as the theme stays. */
export function useMapColours(): MapColours {
  const { theme } = useTheme();
  const read = useMemo(() => ({ theme, colours: readMapColours(document.documentElement) }), [theme]);
  return read.colours;
}
