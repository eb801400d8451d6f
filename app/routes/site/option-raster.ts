import type { GainMap } from '#sim-core/plan/gain-map.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import type { Look } from '#app/workers/quick-look-desk.ts';

/** What colours the map of an option: the cover at the survey, closing years by growth alone, or gains of one more. */
export type MapShow = 'cover' | 'closing' | 'gain';

/** Gains as the map paints them, 255 the most; where none may stand, nothing is gained. */
export function gainRaster({ gains, most }: GainMap): MapRaster {
  const values = Uint8Array.from(gains, (gain) =>
    gain > 0 && most > 0 ? Math.round((Math.min(gain, most) / most) * 255) : 0,
  );
  return { kind: 'share', values, name: 'growth sooner by', most: { value: most, unit: 'years' } };
}

export const closingRaster = (look: Look, surveyYear: number, years: number): MapRaster => ({
  kind: 'closing',
  values: look.years,
  texels: look.texels,
  surveyYear,
  lastYear: surveyYear + years,
});
