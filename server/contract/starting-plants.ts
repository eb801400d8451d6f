import { parameters, rateNames, type RateName } from '#sim-core/spec/parameters.ts';
import { centralValue } from '#sim-core/belief/belief-quantile.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { Plant, RateSource } from './plants.ts';

/** A profile that ships with the product: starting values from the literature, to be replaced by a team's own. */
export interface StartingPlant {
  readonly key: string;
  /** what the plant is, and what to know before it is used */
  readonly about: string;
  readonly plant: Plant;
}

/** What is said of one rate: its law, or the value that is taken as fixed, and where that comes from. */
interface Said extends RateSource {
  readonly belief?: Belief;
  readonly value?: number;
}

const guess = (of: Pick<Said, 'belief' | 'value'>, why = ''): Said => ({
  ...of,
  sure: 'expert guess',
  source: `No published value known to us; a guess${why && `: ${why}`}.`,
});

/** Rates of which nothing published is known to us for any of these plants, with laws as wide as that. */
const guesses = {
  fillRate: guess({ belief: { law: 'log-normal', median: 1, factor: 1.8 } }),
  carryOver: guess({ belief: { law: 'triangular', low: 0.4, mode: 0.7, high: 0.95 } }),
  clumpsPerSquareMetre: guess({ value: 4 }, 'it sets how grainy chance is, so take it fixed'),
  seedlingRate: guess({ value: 0 }, 'growth from what stands alone'),
  backgroundLoss: guess({ belief: { law: 'uniform', low: 0, high: 0.15 } }),
  droughtLoss: guess({ belief: { law: 'triangular', low: 1, mode: 3, high: 6 } }),
  lossWidth: guess({ belief: { law: 'log-normal', median: 0.3, factor: 2 } }),
  tolerance: guess({ belief: { law: 'normal', mean: -2.3, standardDeviation: 0.8 } }),
  exposureShift: guess({ belief: { law: 'triangular', low: 0, mode: 2, high: 4 } }),
  refugeShift: guess({ belief: { law: 'triangular', low: 0.3, mode: 1.9, high: 3.5 } }),
  neighbourShift: guess({ belief: { law: 'triangular', low: 0, mode: 1, high: 2.5 } }),
  refugeGrowth: guess({ belief: { law: 'triangular', low: 0, mode: 1, high: 2.5 } }),
  crowding: guess({ value: 0 }, 'neighbours are taken to do no harm'),
} satisfies Partial<Record<RateName, Said>>;

const unread = 'From memory; check before relying on it';
const abstractRead = 'abstract read, page numbers as given there';

function starting(
  key: string,
  name: string,
  about: string,
  said: Partial<Record<RateName, Said>>,
): StartingPlant {
  const rates = {} as Record<RateName, number>;
  const beliefs: Plant['beliefs'] = {};
  const sources: Plant['sources'] = {};
  for (const rate of rateNames) {
    const { belief, value, ...source } = said[rate] ?? guesses[rate as keyof typeof guesses];
    // To four digits, as the plant page sets it.
    rates[rate] = belief ? Number(centralValue(belief, parameters[rate]).toPrecision(4)) : value!;
    if (belief) beliefs[rate] = belief;
    sources[rate] = source;
  }
  return { key, about, plant: { name, rates: rates, beliefs, sources, fieldNumbers: {} } };
}

const noDrought =
  'The index stands here for whatever stress series you give: a drought index measures neither heat nor light under water.';

/** Starting values for common clonal coastal plants. What no source is known for says so and has a wide law. */
export const startingPlants: readonly StartingPlant[] = [
  starting(
    'smooth-cordgrass',
    'Smooth cordgrass (Spartina alterniflora)',
    'Also called Sporobolus alterniflorus. Lateral spread alone: where seedlings take hold on open mud, edges move far faster; give a seedling rate then.',
    {
      lateralSpread: {
        sure: 'published for this species',
        range: { low: 0.79, high: 2.7 },
        belief: { law: 'triangular', low: 0.3, mode: 0.79, high: 1.5 },
        source:
          'Feist & Simenstad 2000, Estuaries 23:267–274: patches in Willapa Bay grew 0.793 m/yr (standard error 0.017) laterally; whether that is radius or diameter the abstract does not say, so the law reaches down to 0.3. ' +
          'Range: 2.7 ± 0.5 m/yr into a sedge stand, seedlings included, Yangtze Estuary (Estuarine, Coastal and Shelf Science 88:99–104, 2010). Abstracts read.',
      },
    },
  ),
  starting(
    'common-cordgrass',
    'Common cordgrass (Spartina anglica)',
    'Tussocks merge into swards; gullies around tussocks can hold their edges back, which this model does not know.',
    {
      lateralSpread: {
        sure: 'expert guess',
        belief: { law: 'log-normal', median: 0.3, factor: 1.8 },
        source: `${unread}: tussocks spread some decimetres a year. No figure read; the law is wide on purpose.`,
      },
    },
  ),
  starting(
    'common-reed',
    'Common reed (Phragmites australis)',
    'Runners carry it several metres in a good year; in brackish marsh much of its spread is by seed.',
    {
      lateralSpread: {
        sure: 'expert guess',
        range: { low: 0.5, high: 5 },
        belief: { law: 'log-normal', median: 1.5, factor: 2 },
        source: `${unread}: 0.5 to 3 m/yr at stand edges; general reference works give 5 m/yr and more by runners without a source.`,
      },
    },
  ),
  starting(
    'eelgrass',
    'Eelgrass (Zostera marina)',
    `Recovery in large systems hangs on seedlings; give a seedling rate where they are seen. ${noDrought}`,
    {
      lateralSpread: {
        sure: 'published for this species',
        range: { low: 0.16, high: 0.26 },
        belief: { law: 'log-normal', median: 0.18, factor: 1.5 },
        source:
          `Olesen & Sand-Jensen 1994, Marine Ecology Progress Series 106:147–156: patches expanded 0.16 m/yr on average, whatever their size (${abstractRead}). ` +
          'Upper end: rhizome elongation in the review of Marbà & Duarte 1998, Marine Ecology Progress Series, from memory; check before relying on it.',
      },
    },
  ),
  starting('little-neptune-grass', 'Little Neptune grass (Cymodocea nodosa)', noDrought, {
    lateralSpread: {
      sure: 'published for this species',
      range: { low: 0.4, high: 1.6 },
      belief: { law: 'log-normal', median: 0.8, factor: 1.7 },
      source:
        `Duarte & Sand-Jensen 1990, Marine Ecology Progress Series 65, doi 10.3354/meps065193: rhizomes that build patches grow 1.6 m/yr on average (${abstractRead}); a whole front is slower than its fastest rhizomes. ` +
        'Lower end from memory, after the review of Marbà & Duarte 1998; check before relying on it.',
    },
  }),
  starting(
    'neptune-grass',
    'Neptune grass (Posidonia oceanica)',
    `So slow that only cells of a few decimetres, or a horizon of centuries, can show its spread; on larger cells the engine refuses it. ${noDrought}`,
    {
      lateralSpread: {
        sure: 'published for this species',
        range: { low: 0.01, high: 0.06 },
        belief: { law: 'uniform', low: 0.01, high: 0.06 },
        source: `Marbà et al. 1996, Marine Ecology Progress Series 137:203–213: rhizomes grow 1 to 6 cm a year (${abstractRead}).`,
      },
      fillRate: {
        sure: 'published for this species',
        range: { low: 0.02, high: 0.5 },
        belief: { law: 'uniform', low: 0.02, high: 0.5 },
        source: `Marbà et al. 1996, Marine Ecology Progress Series 137:203–213: shoots recruited at 0.02 to 0.5 ln units a year in 29 meadows (${abstractRead}); taken as the rate of increase, losses aside.`,
      },
      backgroundLoss: {
        sure: 'published for this species',
        range: { low: 0.06, high: 0.5 },
        belief: { law: 'uniform', low: 0.06, high: 0.5 },
        source: `Marbà et al. 1996, Marine Ecology Progress Series 137:203–213: shoot mortality of 0.06 to 0.5 ln units a year, above recruitment in 57 % of meadows (${abstractRead}).`,
      },
      carryOver: guess(
        { belief: { law: 'triangular', low: 0.8, mode: 0.93, high: 0.98 } },
        'shoots live for decades',
      ),
    },
  ),
];

export const startingPlant = (key: string): StartingPlant | undefined =>
  startingPlants.find((profile) => profile.key === key);
