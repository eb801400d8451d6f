import type { HabitatClass, Layer } from '#contract/layers.ts';

/**
 * Muted colours that stay apart from one another, from the map's coral and, by turns of lightness, in grey: the first
 * ones as the ground tends to be numbered (water, mud, marsh, …), then hues a golden angle apart.
 */
const palette = ['#8496a2', '#cfc3a6', '#5f8a5e', '#a3a766', '#7b6f93', '#b78f6a', '#4f7f8c', '#b9b7bd'];

function suggestColour(index: number): string {
  if (index < palette.length) return palette[index];
  const hue = (index * 137.508) % 360;
  const lightness = [0.42, 0.6, 0.74][index % 3];
  return hexFromHsl(hue, 0.24, lightness);
}

function hexFromHsl(hue: number, saturation: number, lightness: number): string {
  const reach = saturation * Math.min(lightness, 1 - lightness);
  const channel = (n: number) => {
    const k = (n + hue / 30) % 12;
    const value = lightness - reach * Math.max(-1, Math.min(k - 3, 9 - k, 1));
    return Math.round(255 * value)
      .toString(16)
      .padStart(2, '0');
  };
  return `#${channel(0)}${channel(8)}${channel(4)}`;
}

/**
 * A class table to start from: one row a class found in the raster, ascending. Rows of a table that was set before keep
 * what they say; new ones get a plain name, a colour that no other row has, and ground as good as any (1, 1), for the
 * person to change: guessing capacity from a number would look like knowledge.
 */
export function suggestClasses(
  counts: NonNullable<Layer['classCounts']>,
  known: readonly HabitatClass[] = [],
): HabitatClass[] {
  const taken = new Set(known.map((row) => row.colour.toLowerCase()));
  let next = 0;
  const freshColour = () => {
    let colour = suggestColour(next++);
    while (taken.has(colour)) colour = suggestColour(next++);
    taken.add(colour);
    return colour;
  };
  return counts.map(
    ({ value }) =>
      known.find((row) => row.value === value) ?? {
        value,
        name: `Class ${value}`,
        colour: freshColour(),
        capacity: 1,
        vigour: 1,
      },
  );
}
