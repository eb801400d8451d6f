import { layerParts, type LayerPart } from '#contract/layers.ts';

const hints: Record<LayerPart, RegExp> = {
  habitat: /habitat|class|landcover|land-cover|zones?/i,
  elevation: /elevation|height|dem|dtm|lidar/i,
  cover: /cover|vegetation|canopy/i,
  exposure: /expos|fetch|wave/i,
  refuge: /refuge|mound|shelter/i,
  allowed: /allow|permit/i,
};

/** Parts that most sites have. */
const usual: readonly LayerPart[] = ['habitat', 'cover', 'refuge'];

/** The part that a file most likely plays: by its name, else the first usual one without a layer; undefined when none is free. */
export function guessPart(fileName: string, taken: readonly LayerPart[]): LayerPart | undefined {
  const named = layerParts.find((part) => hints[part].test(fileName));
  return named ?? usual.find((part) => !taken.includes(part));
}
