import type { HeightUnit, LayerPart, ValueUnit } from '#contract/layers.ts';

export const partLabels: Record<LayerPart, string> = {
  habitat: 'Habitat',
  elevation: 'Elevation',
  cover: 'Cover',
  resurvey: 'Resurvey',
  exposure: 'Exposure',
  refuge: 'Refuge',
  allowed: 'Allowed',
};

/** Parts that a run cannot do without. */
export const neededParts: readonly LayerPart[] = ['habitat', 'cover'];

/** Why a part is needed, where there is no layer for it yet. */
export const partReasons: Record<LayerPart, string> = {
  habitat: 'Where the plant can grow: a raster of classes such as creek, mud and marsh. A run needs it.',
  elevation: 'Heights, from which curves derive capacity, vigour and exposure. Optional.',
  cover: 'Where the plant stands now: the share of each cell that it covers. A run starts from it.',
  resurvey:
    'Where the plant stood in a later year: cover again, once a year at most. Optional; rates are fitted to it, and works held against it.',
  exposure: 'Chronic physical stress of each cell, such as waves. Optional; without it there is none.',
  refuge:
    'Where survivors are sheltered: surveyed mounds and the like. Optional; points and areas can say it too.',
  allowed:
    'Where works may go, by permit or by access. Optional; areas can say it too, and without either they may go anywhere.',
};

export const unitLabels: Record<ValueUnit, string> = {
  share: 'shares, 0 to 1',
  percent: 'per cent, 0 to 100',
  byte: '8 bits, 0 to 255',
  presence: 'present or absent, 1 or 0',
};

export const heightUnitLabels: Record<HeightUnit, string> = {
  metre: 'metres',
  foot: 'feet (0.3048 m)',
  'us-foot': 'US survey feet',
};

/** Parts whose values are shares, so that somebody must say in what they are counted. */
export const hasUnit = (part: LayerPart): boolean => part !== 'habitat' && part !== 'elevation';
