const stops = 8;

/**
 * Colour that a closing year has on the map, as CSS that follows the theme.
 * The ramp runs from the year after the survey to the last year.
 */
export function closingColour(year: number, surveyYear: number, lastYear: number): string {
  const span = Math.max(1, lastYear - surveyYear - 1);
  const place = (Math.min(1, Math.max(0, (year - surveyYear - 1) / span)) || 0) * stops;
  const below = Math.min(stops - 1, Math.floor(place));
  const share = Math.round((place - below) * 100);
  return `color-mix(in srgb, var(--color-closing-${below + 1}) ${share}%, var(--color-closing-${below}))`;
}
