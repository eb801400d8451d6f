import type { Block } from '#contract/blocks.ts';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import {
  formatArea,
  formatCount,
  formatCounted,
  formatLength,
  formatNumber,
  formatShare,
} from '#contract/formats.ts';
import { worksInWords } from '#contract/works-words.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { fitKernel } from '#sim-core/index.ts';
import { sourceInWords } from './source-words.ts';
import { rateTable } from './rate-table.ts';
import { outlookInWords } from './outlook-words.ts';

/** What a description by the ODD protocol is filled from. */
export interface OddSource {
  readonly plan: Pick<ComparisonPlan, 'common' | 'options' | 'outlooks' | 'droughtThreshold'>;
  readonly grid: Grid;
  readonly crsName: string;
  readonly engineVersion: string;
  /** futures of each option under each outlook */
  readonly futures: number;
  /** what the raster of a hash is called */
  readonly nameOf: (hash: string) => string;
}

/** Left out of every run, whatever its spec says. */
export const notModelled: readonly string[] = [
  'creeks that move, erosion and sediment that builds up',
  'sea level beyond what the layers and the outlook hold',
  'salinity, nutrients, disease and competition between plant species',
  'seed banks and seasons within a step',
  'loss of works to storms, ice or theft, and works that fail to establish for other reasons than the modelled losses',
  'access, tides, weather windows and crew time',
  'change of the rates over the years',
];

const headings = [
  'Purpose and patterns',
  'Entities, state variables and scales',
  'Process overview and scheduling',
  'Design concepts',
  'Initialization',
  'Input data',
  'Submodels',
] as const;

/**
 * The runs of a comparison described under the seven headings of the ODD protocol (Grimm et al. 2020, JASSS 23(2) 7),
 * filled from their own specification.
 * @param first number of the first heading's section, for a text that has sections before it
 */
export function oddText(source: OddSource): Block[] {
  const bodies = [purpose, entities, schedule, concepts, initialization, inputData, submodels];
  return bodies.flatMap((body, i): Block[] => [
    { kind: 'heading', level: 2, text: `${i + 1}. ${headings[i]}` },
    ...body(source),
  ]);
}

const text = (words: string): Block => ({ kind: 'text', text: words });
const list = (items: readonly string[]): Block => ({ kind: 'list', items: [...items] });

function purpose({ plan }: OddSource): Block[] {
  const { target, surveyYear, years } = plan.common;
  return [
    text(
      `The model says by when ground that a clonal coastal plant has lost closes again, under ${formatCounted(plan.options.length, 'option')} from waiting to works on the ground, and how likely it closes before the next drought. It was built for comparing options, not for forecasting a year. Closed means that the covered area reaches ${formatShare(target)} of the reference cover; a drought is a year with an index at or below ${formatNumber(plan.droughtThreshold)}. The years are ${surveyYear} to ${surveyYear + years}.`,
    ),
    text(
      'Patterns that it is checked against: straight fronts move at the measured speed and as fast along the diagonal as along the rows; expected cover in counts agrees with the mean field; clumped planting wins on exposed ground and dispersed planting on benign ground. These checks are tests of the program; they say nothing about this site.',
    ),
  ];
}

function entities({ plan, grid, crsName }: OddSource): Block[] {
  const { mode, stepsPerYear, boundary, years } = plan.common;
  const area = grid.width * grid.height * grid.cellSize ** 2;
  const state =
    mode === 'counts'
      ? 'the number of standing clumps among its sites, and from it cover, the share of the cell that the plant holds'
      : 'cover, the share of the cell that the plant holds';
  return [
    text(
      `The entities are square cells. A cell has ${state}; its capacity, vigour, exposure, refuge and fence strengths, each a share from 0 to 1 held in 8 bits; and, where grazers are modelled, their density.`,
    ),
    text(
      `Space: ${formatCount(grid.width)} × ${formatCount(grid.height)} cells of ${formatLength(grid.cellSize)}, ${formatArea(area)}, in ${crsName} (EPSG:${grid.epsg}); beyond the edge the map is ${boundary === 'mirror' ? 'mirrored' : 'bare'}. Time: ${formatCounted(years, 'year')} of ${formatCounted(stepsPerYear, 'step')}.`,
    ),
  ];
}

function schedule({ plan }: OddSource): Block[] {
  const { fragments, grazers } = plan.common.processes;
  return [
    text(
      'In each step, all cells at once from the state at its start: works dated in it; spread to neighbours; losses to drought, grazing and background; fragments that break off and settle; grazers that move and multiply. Works act in the first step of their year. The frame of a year is its state at the end of its last step.',
    ),
    text(
      `Fragments are ${fragments ? 'modelled' : 'left out'} here, grazers are ${grazers ? 'modelled' : 'left out'}.`,
    ),
  ];
}

function concepts({ plan, futures }: OddSource): Block[] {
  const { seed, mode } = plan.common;
  return [
    list([
      'Basic principles: growth by lateral spread from what stands, losses that neighbours relieve where it is dry or exposed (stress-gradient hypothesis).',
      'Emergence: when and in what pattern the ground closes follows from spread, loss and the places of what stands; it is not put in.',
      'Interaction: a cell hears its neighbourhood through a discrete Gaussian kernel, and shelters its own plants by it.',
      `Stochasticity: ${mode === 'counts' ? 'survival and recruitment of clumps are binomial draws; ' : 'growth is by expectation; '}weather and losses are drawn where the outlook says so${plan.common.uncertain ? ', and uncertain rates by each future from a Latin hypercube' : ''}. All draws follow from the seed “${seed}” and the number of the future by counter-based generators (Philox4x32-10, Salmon et al. 2011).`,
      `Observation: ${formatCounted(futures, 'future')} of each option under each outlook. Options share weather and luck cell by cell (common random numbers), so that their difference is sharper than two separate samples. Figures rest on the futures that every option has.`,
      'Adaptation, objectives, learning, prediction, sensing and collectives: none; cells follow fixed rules.',
    ]),
  ];
}

function initialization({ plan, nameOf }: OddSource): Block[] {
  const { layers, surveyYear, mode } = plan.common;
  return [
    text(
      `The state at the end of ${surveyYear} is the surveyed cover: ${sourceInWords(layers.cover, nameOf)}${mode === 'counts' ? ', rounded to whole clumps by luck, without bias' : ''}. It is the same for all options; futures differ in their luck alone.`,
    ),
    {
      kind: 'table',
      caption: 'The ground at the start',
      head: ['Layer', 'From'],
      rows: (['capacity', 'vigour', 'exposure', 'refuge', 'fence', 'cover'] as const).map((name) => [
        name,
        sourceInWords(layers[name], nameOf),
      ]),
      numbers: [],
      signs: [],
    },
    {
      kind: 'table',
      caption: 'The works of the options, as they were when the comparison began',
      head: ['Option', 'Works', 'Revision'],
      rows: plan.options.map(({ name, actions, revision }) => [
        name,
        worksInWords(actions),
        String(revision),
      ]),
      numbers: [2],
      signs: [],
    },
  ];
}

function inputData({ plan }: OddSource): Block[] {
  return [
    text(
      'The drought index of every step, on the Palmer scale (negative is dry), and the losses that an outlook expects; nothing else drives the model from outside.',
    ),
    list(
      plan.outlooks.map(
        ({ name, ...outlook }) => `${name}: ${outlookInWords(outlook, plan.common.surveyYear)}`,
      ),
    ),
  ];
}

function submodels({ plan, grid, engineVersion }: OddSource): Block[] {
  const { rates, stepsPerYear } = plan.common;
  const { radius, frontSpeed, diagonalFrontSpeed } = fitKernel(rates, grid.cellSize, stepsPerYear);
  const figure = (value: number) => formatNumber(value, 3);
  return [
    text(
      `Spread: the discrete Gaussian (Lindeberg 1990) along rows and columns, cut at ${formatCounted(radius, 'cell')}; its width is found so that a straight front moves at the lateral spread that was given. As cut it moves at ${figure(frontSpeed)} m a year along the rows and ${figure(diagonalFrontSpeed)} along the diagonal.`,
    ),
    text(
      'Recruitment q = 1 − exp(−(β g (1 + b_M M) e^(−κ(1−E)φ₁) φ + ε Δt)), with φ the neighbours’ cover as a share of capacity. Loss hazard h = h_bg + h_max/(1 + exp((X − X^c)/ω)) + α (1 − F) G at X^c = X0 + a_E E − a_M M − a_N φ₁, of which e^(−hΔt) come through. Standing clumps persist with σ each year and re-issue otherwise.',
    ),
    rateTable(plan.common),
    text(
      `The equations in full stand in the model description that comes with the program (docs/model.md), for engine ${engineVersion}.`,
    ),
  ];
}
