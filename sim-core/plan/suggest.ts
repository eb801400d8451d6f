import type { Action } from '#sim-core/spec/run-spec.ts';
import { candidateNumber, candidatePlaces } from './candidates.ts';
import { coarserGround } from './coarser-ground.ts';
import { gainKnee } from './gain-knee.ts';
import { createQuickLook, type QuickLook, type QuickLookInput } from './quick-look.ts';

/** What is placed: a mound with clumps on it, all of one kind. A radius of 0: clumps alone. */
export interface FootholdKind {
  readonly year: number;
  /** m */
  readonly radius: number;
  readonly strength: number;
  readonly halo: number;
  /** set in its middle */
  readonly clumps: number;
}

export interface SuggestInput extends QuickLookInput {
  /** works that stand already, such as those of the option that is added to */
  readonly works: readonly Action[];
  /** not 0 where works are allowed; everywhere unless said */
  readonly allowed?: Uint8Array;
  readonly foothold: FootholdKind;
  /** how many to place, or what they may cost at so much each */
  readonly amount:
    | { readonly by: 'count'; readonly count: number }
    | { readonly by: 'budget'; readonly budget: number; readonly each: number };
  /** most places that are weighed against each other; of itself: `candidateNumber` */
  readonly candidates?: number;
}

export interface SuggestProgress {
  readonly stage: 'weighing' | 'placing';
  /** places weighed so far, or footholds placed */
  readonly done: number;
  readonly of: number;
}

/** One foothold that was placed, in order. */
export interface SuggestedFoothold {
  readonly x: number;
  readonly y: number;
  /** years by which it brings the mean arrival forward, given those before it */
  readonly gain: number;
}

export interface Suggestion {
  readonly footholds: readonly SuggestedFoothold[];
  /** the same as works, ready to be drawn on */
  readonly works: readonly Action[];
  /** number of footholds after which each further one buys clearly less (`gainKnee`), undefined where there is no bend */
  readonly knee: number | undefined;
  /** places that were weighed, and how often one was */
  readonly candidates: number;
  readonly weighed: number;
}

/** How many places are weighed unless it is said. */
export const usualNumber = ({
  grid,
  rates,
  years,
  surveyYear,
  foothold,
}: Omit<SuggestInput, 'amount'>): number =>
  candidateNumber(
    grid.width * grid.height,
    (rates.lateralSpread * Math.max(0, surveyYear + years - foothold.year)) / grid.cellSize,
  );

/** A look at what stands, on cells coarse enough to be looked at many times. */
export function lookWithWorks(input: Omit<SuggestInput, 'amount' | 'foothold'>): QuickLook {
  const look = createQuickLook(coarserGround(input));
  look.change({ removed: [], added: input.works.map((action, i) => [i, action] as const) });
  return look;
}

/** The works that make up one foothold. */
export function footholdWorks(x: number, y: number, kind: FootholdKind): Action[] {
  const { year, radius, strength, halo, clumps } = kind;
  const works: Action[] = [];
  if (radius > 0) works.push({ kind: 'mound', year, x, y, radius, strength, halo });
  if (clumps > 0) works.push({ kind: 'clumps', year, points: [[x, y]], each: clumps });
  return works;
}

/**
 * Places footholds one after the other, each where it brings the area-weighted mean arrival of growth forward most
 * (what does not arrive by the horizon counts as arriving then). For a gain that shrinks as more is there, this comes to
 * at least 1 − 1/e of the best (Nemhauser, Wolsey & Fisher 1978, Mathematical Programming 14:265–294); so it is weighed
 * lazily: a gain found earlier bounds the gain now, and only the places at the top are weighed again (Minoux 1978).
 *
 * Yields its progress; what it returns is the suggestion.
 *
 * @throws RangeError where a budget is to be spent on what costs nothing
 */
export function* suggest(input: SuggestInput): Generator<SuggestProgress, Suggestion> {
  const { foothold, amount, works } = input;
  if (amount.by === 'budget' && !(amount.each > 0))
    throw new RangeError(`Found a cost of ${amount.each} for each foothold; expected more than 0`);
  const look = lookWithWorks(input);
  const candidates = candidatePlaces(input, input.candidates ?? usualNumber(input)).places;
  const wanted = Math.min(
    candidates.length,
    amount.by === 'count' ? amount.count : Math.floor((amount.budget / amount.each) * (1 + 1e-12)),
  );
  let weighed = 0;
  const weigh = (at: { x: number; y: number }) => {
    weighed++;
    return look.gainOf(footholdWorks(at.x, at.y, foothold));
  };
  const open: { x: number; y: number; gain: number; at: number }[] = [];
  for (const [i, place] of candidates.entries()) {
    yield { stage: 'weighing', done: i, of: candidates.length };
    open.push({ ...place, gain: weigh(place), at: 0 });
  }
  const byGain = (a: { gain: number }, b: { gain: number }) => b.gain - a.gain;
  open.sort(byGain);
  const footholds: SuggestedFoothold[] = [];
  while (footholds.length < wanted) {
    yield { stage: 'placing', done: footholds.length, of: wanted };
    while (open.length > 0 && open[0].at < footholds.length) {
      const first = open[0];
      first.gain = weigh(first);
      first.at = footholds.length;
      let place = 1;
      while (place < open.length && open[place].gain > first.gain) {
        open[place - 1] = open[place];
        place++;
      }
      open[place - 1] = first;
    }
    const best = open.shift();
    if (!best || !(best.gain > 0)) break;
    footholds.push({ x: best.x, y: best.y, gain: best.gain });
    look.change({
      removed: [],
      added: footholdWorks(best.x, best.y, foothold).map((action, i) => [
        works.length + footholds.length * 2 + i,
        action,
      ]),
    });
  }
  return {
    footholds,
    works: footholds.flatMap(({ x, y }) => footholdWorks(x, y, foothold)),
    knee: gainKnee(footholds.map(({ gain }) => gain)),
    candidates: candidates.length,
    weighed,
  };
}
