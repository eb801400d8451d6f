import type { LayerPart } from '#contract/layers.ts';

/** In the order in which they are tried: `landcover` is habitat before it is cover. */
const hints: readonly [LayerPart, RegExp][] = [
  ['habitat', /habitat|class|landcover|land-cover|zones?/i],
  ['elevation', /elev|heights?|(^|[^a-z])(dem|dtm|dsm)([^a-z]|$)|lidar|bathy|topo/i],
  ['resurvey', /resurvey|repeat/i],
  ['cover', /cover|vegetation|canopy/i],
  ['exposure', /exposure|waves?|fetch|stress/i],
  ['refuge', /refuge|mound|shelter/i],
  ['allowed', /allow|permit|access/i],
];
/** Parts that a file without a telling name is taken for, in this order. */
const usual: readonly LayerPart[] = ['habitat', 'cover', 'refuge'];

/** The part that a file most likely plays: by its name, else the first usual one that has no layer yet. */
export function guessPart(fileName: string, taken: readonly LayerPart[]): LayerPart | undefined {
  const named = hints.find(([, hint]) => hint.test(fileName));
  return named?.[0] ?? usual.find((part) => !taken.includes(part));
}
