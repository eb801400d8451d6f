import type { Block } from '#contract/blocks.ts';
import type { BriefFacts } from '#contract/brief-content.ts';
import { formatMoney } from '#contract/format-money.ts';
import { formatCounted, formatDate, formatDateTime } from '#contract/formats.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';
import { engineVersion, fitKernel } from '#sim-core/index.ts';
import type { BriefSource } from './brief-facts.ts';
import { notModelled, oddText } from './odd/odd-text.ts';

const heading = (level: 1 | 2, text: string): Block => ({ kind: 'heading', level, text });
const text = (words: string): Block => ({ kind: 'text', text: words });
const table = (
  caption: string,
  head: string[],
  rows: string[][],
  columns: { numbers?: number[]; signs?: number[] } = {},
): Block => ({
  kind: 'table',
  caption,
  head,
  rows,
  numbers: columns.numbers ?? [],
  signs: columns.signs ?? [],
});

type Figures = Omit<BriefFacts, 'suggested' | 'annex'>;

/** The technical annex of a brief: results, what was run by ODD, checks and warnings, and how to repeat it. */
export function annexOf(source: BriefSource, facts: Figures, shared: readonly number[]): Block[] {
  const names = new Map(source.layers.map(({ hash, fileName }) => [hash, fileName]));
  return [
    heading(1, 'A. Results'),
    ...facts.outlooks.flatMap((_, o) => resultsOf(facts, o)),
    heading(1, 'B. What was run'),
    text(
      'Under the headings of the ODD protocol (Grimm et al. 2020, Journal of Artificial Societies and Social Simulation 23(2) 7), filled from the specification of the runs.',
    ),
    ...oddText({
      plan: source.plan,
      grid: source.grid,
      crsName: source.crsName,
      engineVersion,
      futures: shared.length,
      nameOf: (hash) => names.get(hash) ?? `raster ${hash.slice(0, 12)}`,
    }),
    heading(1, 'C. Checks, warnings and limits'),
    ...limitsOf(source, facts),
    heading(1, 'D. To repeat it'),
    ...repeatOf(source, shared),
    heading(1, 'E. Sources of the methods'),
    { kind: 'list', items: [...sources] },
  ];
}

function resultsOf(facts: Figures, o: number): Block[] {
  const outlook = facts.outlooks[o];
  const { surveyYear, currency } = facts;
  const range = (i: { low: number; high: number }, say: (n: number) => string) =>
    `${say(i.low)} to ${say(i.high)}`;
  const whole = (share: number) => String(of100(share));
  const oneDecimal = (n: number) => n.toFixed(1).replace('-', '−');
  return [
    heading(2, `Under “${outlook.name}”`),
    text(outlook.words),
    table(
      `Of 100 futures, with 95 % intervals; from ${facts.comparison.done} of each option`,
      [
        'Option',
        'In time',
        'Interval',
        'Drought first',
        'Neither',
        'Open again',
        'Best',
        ...(currency ? ['Cost'] : []),
      ],
      outlook.options.map((figures, i) => [
        facts.options[i].name,
        whole(figures.chance.estimate),
        range(figures.chance, whole),
        String(figures.drought),
        String(figures.neither),
        String(figures.lostAgain),
        `${whole(figures.best.estimate)} %`,
        ...(currency
          ? [facts.options[i].cost === null ? '–' : formatMoney(facts.options[i].cost, currency)]
          : []),
      ]),
      { numbers: [1, 2, 3, 4, 5, 6, 7] },
    ),
    table(
      'Years to closing, and ground covered at the horizon',
      ['Option', 'Half closed by', 'Mean years', 'Interval', 'Sooner than Wait', 'Interval', 'Covered, ha'],
      outlook.options.map((figures, i) => [
        facts.options[i].name,
        figures.medianTime === null
          ? 'not by the horizon'
          : String(surveyYear + Math.round(figures.medianTime)),
        oneDecimal(figures.meanTime.estimate),
        range(figures.meanTime, oneDecimal),
        figures.sooner ? oneDecimal(figures.sooner.estimate) : '–',
        figures.sooner ? range(figures.sooner, oneDecimal) : '–',
        (figures.covered / 10_000).toFixed(2),
      ]),
      { numbers: [1, 2, 3, 4, 5, 6] },
    ),
    { kind: 'curves', outlook: o },
    text(
      '“Drought first” and “neither” are counts of futures. Mean years are cut at the horizon (restricted mean); futures that are open there are censored, never dropped. Curves: Kaplan & Meier with Greenwood’s variance.',
    ),
  ];
}

function limitsOf(source: BriefSource, facts: Figures): Block[] {
  const { plan } = source;
  const { rates, stepsPerYear } = plan.common;
  const warnings = [
    ...source.warnings,
    ...fitKernel(rates, source.grid.cellSize, stepsPerYear).warnings,
    ...(source.comparison.ending === 'stopped by hand'
      ? ['The comparison was stopped by hand before all its futures were run.']
      : []),
    ...(facts.comparison.done < plan.replicates
      ? [`${facts.comparison.done} of ${plan.replicates} futures that were asked for are done.`]
      : []),
  ];
  return [
    heading(2, 'Checks'),
    {
      kind: 'list',
      items: [
        'Every stored future has the digest (SHA-256) of all its frames; the server refuses a future that was sent twice with different digests.',
        `Figures rest on the ${formatCounted(facts.comparison.done, 'future')} that every option has; none was dropped.`,
        `Works, costs, rates, outlooks and layers are those of the comparison’s beginning, ${formatDateTime(source.comparison.startedAt)}, started by ${source.comparison.startedBy}.`,
      ],
    },
    heading(2, 'Warnings'),
    warnings.length > 0
      ? { kind: 'list', items: warnings }
      : text('None was recorded with the comparison, and the cell is fine enough for its step.'),
    heading(2, 'Not modelled'),
    { kind: 'list', items: [...notModelled] },
    ...(facts.invented ? [text('The place, its people and its data are invented.')] : []),
  ];
}

function repeatOf(source: BriefSource, shared: readonly number[]): Block[] {
  const { plan, records, layers } = source;
  const [number] = shared;
  const digest = (option: number, outlook: number) =>
    records[option][outlook].find(({ replicate }) => replicate === number)?.digest ?? '';
  return [
    text(
      `Engine ${engineVersion} at the time of this brief; specification version ${plan.common.version}; seed “${plan.common.seed}”; futures ${shared[0]} to ${shared.at(-1)}; bootstrap seeds follow from the comparison’s id, ${source.comparison.id}. The same specification and layers give the same digest in every browser and on the command line.`,
    ),
    table(
      'Layers',
      ['Part', 'File', 'Uploaded', 'SHA-256'],
      layers.map(({ part, fileName, uploadedAt, hash }) => [part, fileName, formatDate(uploadedAt), hash]),
      { signs: [3] },
    ),
    table(
      `Digests of future ${number}, to check a repetition by`,
      ['Option', 'Outlook', 'SHA-256 of its frames'],
      plan.options.flatMap(({ name }, option) =>
        plan.outlooks.map((outlook, o) => [name, outlook.name, digest(option, o)]),
      ),
      { signs: [2] },
    ),
  ];
}

const sources = [
  'Wilson 1927, Journal of the American Statistical Association 22:209 (intervals of chances)',
  'Kaplan & Meier 1958, Journal of the American Statistical Association 53:457 (recovery curves)',
  'Efron 1987, Journal of the American Statistical Association 82:171 (intervals of paired differences)',
  'Grimm et al. 2020, Journal of Artificial Societies and Social Simulation 23(2) 7 (ODD protocol)',
  'Lindeberg 1990, IEEE Transactions on Pattern Analysis and Machine Intelligence 12:234 (discrete Gaussian; pages from memory)',
  'Salmon et al. 2011, Proceedings of SC11 (counter-based random numbers)',
];
