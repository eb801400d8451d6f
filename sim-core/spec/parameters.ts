/**
 * The rates of the model: one table that the form, the API and the kernel all read.
 *
 * `default` and `min`..`max` are in `unit`. `source` says where the default comes from; "common practice, no source"
 * marks a habit of the trade and "from memory" a figure to be replaced by the team's own measurements.
 */
export interface Parameter {
  readonly label: string;
  readonly symbol: string;
  readonly unit: string;
  readonly meaning: string;
  readonly default: number;
  readonly min: number;
  readonly max: number;
  readonly source: string;
}

const parameter = (p: Parameter): Parameter => p;

/** Speeds of a front, m/yr, beyond which a run says that its belief outruns what is published. */
export const publishedFrontSpeed = {
  least: 0.2,
  most: 1.5,
  source: 'Spartina alterniflora on open mud, from memory',
} as const;

export const parameters = {
  lateralSpread: parameter({
    label: 'Lateral spread',
    symbol: 'c',
    unit: 'm/yr',
    meaning: 'Speed of a straight front on good ground without losses',
    default: 0.5,
    min: 0.005,
    max: 20,
    source:
      'Within 0.2 to 1.5 m/yr for Spartina alterniflora on open mud, from memory; compare Feist & Simenstad 2000, Estuaries 23:267–274',
  }),
  fillRate: parameter({
    label: 'Fill-in rate',
    symbol: 'r',
    unit: '1/yr',
    meaning: 'Low-density rate of increase, losses aside',
    default: 1,
    min: 0.01,
    max: 10,
    source: 'common practice, no source',
  }),
  carryOver: parameter({
    label: 'Carry-over',
    symbol: 'σ',
    unit: 'share a year',
    meaning: 'Share of standing clumps that persist a year without being re-issued',
    default: 0.7,
    min: 0,
    max: 1,
    source: 'common practice, no source',
  }),
  clumpsPerSquareMetre: parameter({
    label: 'Clump sites',
    symbol: 'ν',
    unit: '1/m²',
    meaning: 'Clump sites on full ground; sets how grainy chance is',
    default: 4,
    min: 0.0001,
    max: 1000,
    source: 'common practice, no source',
  }),
  seedlingRate: parameter({
    label: 'Seedling rate',
    symbol: 'ε',
    unit: '1/yr',
    meaning: 'Establishment pressure that needs no neighbour',
    default: 0,
    min: 0,
    max: 1,
    source: 'common practice, no source',
  }),
  backgroundLoss: parameter({
    label: 'Background loss',
    symbol: 'h_bg',
    unit: '1/yr',
    meaning: 'Loss hazard in every year',
    default: 0,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
  droughtLoss: parameter({
    label: 'Drought loss',
    symbol: 'h_max',
    unit: '1/yr',
    meaning: 'Loss hazard once the drought index is far below what the spot can bear',
    default: 3,
    min: 0,
    max: 20,
    source: 'common practice, no source',
  }),
  lossWidth: parameter({
    label: 'Loss width',
    symbol: 'ω',
    unit: 'index',
    meaning: 'How sharply drought loss sets in around the tolerance',
    default: 0.3,
    min: 0.01,
    max: 5,
    source: 'common practice, no source',
  }),
  tolerance: parameter({
    label: 'Tolerance',
    symbol: 'X0',
    unit: 'index',
    meaning:
      'Index at which half of the drought loss acts on unsheltered, unexposed ground without neighbours',
    default: -2.3,
    min: -10,
    max: 5,
    source: 'common practice, no source',
  }),
  exposureShift: parameter({
    label: 'Exposure shift',
    symbol: 'a_E',
    unit: 'index',
    meaning: 'How far full exposure raises that index',
    default: 2,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
  refugeShift: parameter({
    label: 'Refuge shift',
    symbol: 'a_M',
    unit: 'index',
    meaning: 'How far a full-strength refuge lowers that index',
    default: 1.9,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
  neighbourShift: parameter({
    label: 'Neighbour shift',
    symbol: 'a_N',
    unit: 'index',
    meaning: 'How far full neighbours lower that index',
    default: 1,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
  refugeGrowth: parameter({
    label: 'Refuge growth',
    symbol: 'b_M',
    unit: '–',
    meaning: 'Extra growth on a full-strength refuge',
    default: 1,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
  crowding: parameter({
    label: 'Crowding',
    symbol: 'κ',
    unit: '–',
    meaning: 'Loss of recruitment to neighbours on unexposed ground',
    default: 0,
    min: 0,
    max: 10,
    source: 'common practice, no source',
  }),
} as const;

export type RateName = keyof typeof parameters;
export type Rates = { [name in RateName]: number };

export const rateNames = Object.keys(parameters) as RateName[];

/** Every rate at its default. */
export const defaultRates = Object.fromEntries(rateNames.map((n) => [n, parameters[n].default])) as Rates;
