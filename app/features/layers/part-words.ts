import type { LayerPart, ValueUnit } from '#contract/sites.ts';

export const partLabels: Record<LayerPart, string> = {
  habitat: 'Habitat',
  cover: 'Cover',
  refuge: 'Refuge',
};

/** Why a part is needed, where there is no layer for it yet. */
export const partReasons: Record<LayerPart, string> = {
  habitat: 'Where the plant can grow: a raster of classes such as creek, mud and marsh. A run needs it.',
  cover: 'Where the plant stands now: the share of each cell that it covers. A run starts from it.',
  refuge: 'Where survivors are sheltered: surveyed mounds and the like. Optional; without it there are none.',
};

/** What a file for the part holds, in a few words. */
export const partHolds: Record<LayerPart, string> = {
  habitat: 'classes of ground',
  cover: 'share covered now',
  refuge: 'strength of shelter',
};

export const unitLabels: Record<ValueUnit, string> = {
  share: 'shares, 0 to 1',
  percent: 'per cent, 0 to 100',
  byte: '8 bits, 0 to 255',
  presence: 'present or absent, 1 or 0',
};
