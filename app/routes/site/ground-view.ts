import { layerParts, type LayerPart } from '#contract/layers.ts';

/** What the engine makes of the layers, each a map. */
export const engineMaps = ['capacity', 'vigour', 'exposure', 'refuge', 'fence', 'cover'] as const;
export type EngineMap = (typeof engineMaps)[number];

/** What the Ground map shows: a layer as it came, or what the engine will see. */
export type GroundView =
  /** `year` of a resurvey */
  | { readonly of: 'layer'; readonly part: LayerPart; readonly year?: number }
  | { readonly of: 'engine'; readonly map: EngineMap };

export const engineLabels: Record<EngineMap, string> = {
  capacity: 'capacity',
  vigour: 'vigour',
  exposure: 'exposure',
  refuge: 'refuge',
  fence: 'fences',
  cover: 'cover at the start',
};

/** How the view stands in the address: `cover`, `resurvey-2030`, or `engine-cover`. */
export const viewKey = (view: GroundView): string =>
  view.of === 'engine'
    ? `engine-${view.map}`
    : view.year === undefined
      ? view.part
      : `${view.part}-${view.year}`;

/**
 * The view that an address asks for; the first layer where it asks for none that is there.
 *
 * @param present parts with a layer, resurveys left out; @param years of the resurveys
 */
export function readView(
  asked: string | null,
  present: readonly LayerPart[],
  years: readonly number[] = [],
): GroundView | undefined {
  const year = years.find((each) => asked === `resurvey-${each}`);
  if (year !== undefined) return { of: 'layer', part: 'resurvey', year };
  const map = engineMaps.find((name) => asked === `engine-${name}`);
  if (map && present.length > 0) return { of: 'engine', map };
  const part = layerParts.find((name) => name === asked && present.includes(name)) ?? present.at(0);
  return part && { of: 'layer', part };
}
