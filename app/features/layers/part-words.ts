import type { LayerPart, ValueUnit } from '#contract/layers.ts';

export const partLabels: Record<LayerPart, string> = {
  habitat: 'Habitat',
  elevation: 'Elevation',
  cover: 'Cover',
  exposure: 'Exposure',
  refuge: 'Refuge',
  allowed: 'Allowed',
};

/** Why a part is needed, where there is no layer for it yet. */
export const partReasons: Record<LayerPart, string> = {
  habitat: 'Where the plant can grow: a raster of classes such as creek, mud and marsh. A run needs it.',
  elevation: 'How high the ground lies. Optional; curves say what it does to capacity, vigour and exposure.',
  cover: 'Where the plant stands now: the share of each cell that it covers. A run starts from it.',
  exposure:
    'Where waves and currents wear at the plant. Optional; without it the ground counts as sheltered.',
  refuge: 'Where survivors are sheltered: surveyed mounds and the like. Optional; without it there are none.',
  allowed: 'Where works may go. Optional; without it they may go anywhere.',
};

/** What a file for the part holds, in a few words. */
export const partHolds: Record<LayerPart, string> = {
  habitat: 'classes of ground',
  elevation: 'heights',
  cover: 'share covered now',
  exposure: 'strength of physical stress',
  refuge: 'strength of shelter',
  allowed: 'where works may go',
};

export const unitLabels: Record<ValueUnit, string> = {
  share: 'shares, 0 to 1',
  percent: 'per cent, 0 to 100',
  byte: '8 bits, 0 to 255',
  presence: 'present or absent, 1 or 0',
};
