import type { ComparisonPlan, Decision } from '#contract/comparisons.ts';
import { worksInWords } from '#contract/works-words.ts';
import type { BriefFacts, BriefFigures } from '#contract/brief-content.ts';
import {
  comparisonFigures,
  type OptionFigures,
  type OutlookFigures,
} from '#sim-core/compare/comparison-figures.ts';
import { sharedReplicates, type KnownRecords } from '#sim-core/compare/known-records.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { annexOf } from './annex.ts';
import { suggestedText } from './brief-words.ts';
import { cautions } from './cautions.ts';
import { outlookInWords } from './odd/outlook-words.ts';

/** A raster that a comparison stands on, as its layer tells it. */
export interface NamedLayer {
  readonly hash: string;
  readonly part: string;
  readonly fileName: string;
  /** the instant of its upload */
  readonly uploadedAt: string;
}

/** All that a brief's figures are made of. Plain data: it goes to a worker as it is. */
export interface BriefSource {
  readonly madeAt: string;
  readonly teamName: string;
  readonly siteName: string;
  readonly invented: boolean;
  readonly grid: Grid;
  readonly crsName: string;
  readonly comparison: {
    readonly id: string;
    readonly name: string;
    readonly startedAt: string;
    readonly startedBy: string;
    readonly ending: string | null;
  };
  readonly plan: ComparisonPlan;
  readonly decision: Decision | null;
  readonly layers: readonly NamedLayer[];
  /** what is stored of each ensemble, `[option][outlook]` */
  readonly records: readonly (readonly (readonly ReplicateRecord[])[])[];
  /** futures in the closing map of each option under the first outlook; null where none is stored */
  readonly mapFutures: readonly (number | null)[];
  /** what the comparison was warned of */
  readonly warnings: readonly string[];
}

/** More marks than this could not be told apart on a map of a third of a page. */
const mostPlaces = 300;

/**
 * The figures of a brief, frozen: what the comparison comes to over the futures that every option has.
 * @throws RangeError where there are fewer than two of them
 */
export function briefFacts(source: BriefSource): BriefFacts {
  const { plan, decision } = source;
  const known: KnownRecords = source.records.map((option) =>
    option.map((records) => new Map(records.map((record) => [record.replicate, record]))),
  );
  const shared = sharedReplicates(known);
  if (shared.length < 2)
    throw new RangeError(`Found ${shared.length} futures of every option; a brief rests on at least two.`);
  const { outlooks } = comparisonFigures(plan, known, source.comparison.id);
  const covered = (option: number, outlook: number) =>
    shared.reduce(
      (sum, replicate) => sum + (known[option][outlook].get(replicate)!.coveredArea.at(-1) ?? 0),
      0,
    ) / shared.length;
  const facts: Omit<BriefFacts, 'suggested' | 'annex'> = {
    madeAt: source.madeAt,
    teamName: source.teamName,
    siteName: source.siteName,
    invented: source.invented,
    grid: source.grid,
    crsName: source.crsName,
    comparison: { id: source.comparison.id, name: source.comparison.name, done: shared.length },
    surveyYear: plan.common.surveyYear,
    years: plan.common.years,
    target: plan.common.target,
    droughtThreshold: plan.droughtThreshold,
    currency: plan.currency,
    options: plan.options.map(({ name, wait, cost, actions }, option) => ({
      name,
      wait,
      cost,
      works: worksInWords(actions),
      places: placesOn(source.grid, actions),
      mapFutures: source.mapFutures[option],
    })),
    outlooks: outlooks.map((figures, o) => ({
      name: figures.name,
      words: outlookInWords(plan.outlooks[o], plan.common.surveyYear),
      options: figures.options.map((option, i) => figuresOf(figures, option, i, covered(i, o))),
    })),
    lead: leadOf(plan, decision, outlooks),
    decision,
    cautions: [...cautions],
  };
  return {
    ...facts,
    suggested: suggestedText(facts, source.warnings),
    annex: annexOf(source, facts, shared),
  };
}

function figuresOf(
  { pairs, options }: OutlookFigures,
  { summary, best, lostAgain, wait }: OptionFigures,
  place: number,
  covered: number,
): BriefFigures {
  const againstWait = pairs.find(({ first, second }) => first === place && options[second].wait);
  const { share, recovery, drought, neither } = summary.beforeDrought;
  const only = ({ estimate, low, high }: { estimate: number; low: number; high: number }) => ({
    estimate,
    low,
    high,
  });
  return {
    chance: only(share!),
    recovery,
    drought,
    neither,
    medianTime: summary.medianTime ?? null,
    meanTime: only(summary.restrictedMean!),
    sooner: againstWait && !wait ? only(againstWait.sooner) : null,
    best: only(best),
    lostAgain,
    covered,
    curve: summary.recovery.map((point) => ({ ...point })),
  };
}

/** The option decided for; else the likeliest to close in time under the first outlook, and of these the cheapest. */
function leadOf(plan: ComparisonPlan, decision: Decision | null, [first]: readonly OutlookFigures[]): number {
  const decided = plan.options.findIndex(({ optionId }) => optionId === decision?.optionId);
  if (decided >= 0) return decided;
  const chance = (i: number) => first.options[i].summary.beforeDrought.share?.estimate ?? 0;
  return plan.options
    .map((_, i) => i)
    .reduce((best, i) => {
      const gained = chance(i) - chance(best);
      const cheaper = (plan.options[i].cost ?? 0) < (plan.options[best].cost ?? 0);
      return gained > 0 || (gained === 0 && cheaper) ? i : best;
    });
}

/** Where works stand on the map, thinned evenly where there are too many to draw. */
function placesOn(grid: Grid, actions: readonly Action[]): [number, number][] {
  const points = actions.flatMap((action): (readonly [number, number])[] => {
    if (action.kind === 'mound') return [[action.x, action.y]];
    if (action.kind === 'clumps') return action.points;
    if (action.kind === 'loss') return [];
    return action.area.shape === 'disc' ? [[action.area.x, action.area.y]] : [middle(action.area.ring)];
  });
  const every = Math.ceil(points.length / mostPlaces);
  const { originX, originY, width, height, cellSize } = grid;
  const round = (share: number) => Math.round(share * 1e4) / 1e4;
  return points
    .filter((_, i) => i % every === 0)
    .map(([x, y]) => [round((x - originX) / (width * cellSize)), round((originY - y) / (height * cellSize))]);
}

const middle = (ring: readonly (readonly [number, number])[]): [number, number] => [
  ring.reduce((sum, [x]) => sum + x, 0) / ring.length,
  ring.reduce((sum, [, y]) => sum + y, 0) / ring.length,
];
