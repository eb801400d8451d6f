import { useMemo, useState } from 'react';
import { newWorkId, type Work } from '#contract/works.ts';
import type { LaidPoints } from '#sim-core/plan/pattern.ts';
import type { PatternRequest } from '#app/workers/quick-look-desk.ts';
import type { PenMound } from '../mound-pen.ts';
import type { DraftAction, OptionDraft } from '../option-draft.ts';
import type { BoardPens } from './board-pens.ts';
import { isClumpPattern, isPattern, type BoardTool } from './board-tools.ts';
import { laidWorks } from './laid-works.ts';
import { useParked } from './use-parked.ts';
import { penOf, readPattern, type PatternErrors } from './pattern-pen.ts';
import type { Sketch, SketchEvent } from './sketch.ts';
import { usePattern, type PatternLayer } from './use-pattern.ts';

export interface LayingInput {
  readonly tool: BoardTool;
  readonly pens: BoardPens;
  readonly draft: OptionDraft;
  readonly draw: (action: DraftAction) => void;
  readonly sketch: Sketch;
  /** what the mounds of a pattern are; undefined where that is typed wrong */
  readonly mound: PenMound | undefined;
  readonly year: number | undefined;
  readonly layer: PatternLayer | undefined;
  readonly unitCosts: { readonly mound: number; readonly clump: number } | undefined;
  readonly onMissed: () => void;
  /** it was placed: else the next pattern would show at once, as if nothing had been placed */
  readonly onPlaced: (works: readonly Work[]) => void;
  /** What waited was placed, beside the tool in use. */
  readonly onAdded: (works: readonly Work[]) => void;
  readonly onTool: (tool: BoardTool) => void;
  readonly onPens: (pens: BoardPens) => void;
  readonly onSketch: (event: SketchEvent) => void;
}

/** A pattern that is being laid: what it comes to, and the way to place it. */
export interface Laying {
  readonly errors: PatternErrors;
  /** it lays mounds, and not clumps */
  readonly ofMounds: boolean;
  /** a line or an outline is still to be drawn */
  readonly needsSketch: boolean;
  readonly ready: boolean;
  readonly busy: boolean;
  readonly error: unknown;
  readonly laid: LaidPoints | undefined;
  /** works as they would be placed, of the tool in use */
  readonly works: readonly Work[];
  /** works of patterns that wait to be placed while another tool is in use */
  readonly parked: readonly Work[];
  readonly placeParked: () => void;
  readonly dropParked: () => void;
  /** The tool is about to be left: what it shows is kept until it is placed or dropped. */
  readonly park: () => void;
  /** A pattern's tool is taken up: what waited last comes back to it, with its outline. */
  readonly resume: (tool: BoardTool) => void;
  /** chance plays a part */
  readonly chance: boolean;
  /** it takes the place of works that were laid before */
  readonly again: boolean;
  /** @returns whether anything was placed */
  readonly place: () => boolean;
  readonly layAgain: () => void;
  /** Takes up a set that was laid before, with its sentence and its outline. */
  readonly takeUp: (setId: string) => void;
}

const noWorks: readonly Work[] = [];
const byChance = new Set(['scattered', 'apart', 'groups']);
const newSeed = () => newWorkId();

export function useLaying(input: LayingInput): Laying {
  const { tool, pens, draft, sketch, mound, year, layer } = input;
  const [seed, setSeed] = useState(newSeed);
  const [takenUp, setTakenUp] = useState<{ set: string; tool: BoardTool }>();
  const pattern = isPattern(tool) ? tool : undefined;
  const pen = pattern && pens.patterns[pattern];
  const ofMounds = pattern !== undefined && !isClumpPattern(pattern);
  const drawn = sketch.done ? sketch.points : undefined;
  const needsSketch = pattern !== undefined && (pattern === 'line' || pen?.region === 'outline') && !drawn;
  const { unitCosts } = input;
  const read = useMemo(
    () =>
      pattern &&
      pen &&
      readPattern(pattern, pen, {
        unitCost: ofMounds
          ? unitCosts && mound && unitCosts.mound + mound.clumps * unitCosts.clump
          : unitCosts?.clump,
        line: drawn ?? [],
      }),
    [pattern, pen, ofMounds, unitCosts, mound, drawn],
  );
  const request = useMemo((): PatternRequest | undefined => {
    if (!read?.pattern || !pen || needsSketch) return undefined;
    return {
      pattern: read.pattern,
      ring: pattern !== 'line' && drawn && pen.region === 'outline' ? drawn : undefined,
      bareOnly: pen.ground === 'bare' && pattern !== 'line',
      seed,
    };
  }, [read, pen, needsSketch, pattern, drawn, seed]);
  const asked = usePattern(layer, request);
  const laid = request ? asked.data : undefined;

  const made = useMemo(() => {
    if (!laid || !pattern || !pen || !read?.pattern || year === undefined) return undefined;
    if (ofMounds && !mound) return undefined;
    const nothing: PenMound = { radius: 1, strength: 1, halo: 0, clumps: 0 };
    const setting = { tool: pattern, pen, pattern: read.pattern, seed, outline: drawn, year };
    return laidWorks(laid.points, { ...setting, mound: mound ?? nothing }, newWorkId);
  }, [laid, pattern, pen, read, year, ofMounds, mound, seed, drawn]);

  const parking = useParked();
  const again = takenUp !== undefined && takenUp.tool === tool && hasSet(draft, takenUp.set);
  const instead = again ? takenUp.set : undefined;
  const standing = made && made.works.length > 0 && !asked.isPlaceholderData ? made : undefined;
  const place = (): boolean => {
    if (!standing) {
      input.onMissed();
      return false;
    }
    const { works, set } = standing;
    input.draw({ type: 'add', works, sets: [set], instead: worksOfSets(draft, [instead]) });
    setTakenUp(undefined);
    setSeed(newSeed());
    input.onPlaced(works);
    return true;
  };
  const park = () => {
    if (!standing || !pattern) return;
    parking.park({ ...standing, tool: pattern, instead });
    setTakenUp(undefined);
    setSeed(newSeed());
  };
  const resume = (next: BoardTool) => {
    const last = parking.take(next);
    if (!last) return;
    const how = last.set.laid;
    input.onSketch({ type: 'put', points: how.outline ?? [] });
    setSeed(how.seed);
    setTakenUp(last.instead === undefined ? undefined : { set: last.instead, tool: next });
  };
  const placeParked = () => {
    const { works, sets, instead: others } = parking;
    input.draw({ type: 'add', works, sets, instead: worksOfSets(draft, others) });
    parking.drop();
    input.onAdded(works);
  };
  const takeUp = (setId: string) => {
    const set = draft.sets.find(({ id }) => id === setId);
    const found = set && penOf(set.laid.parameters);
    if (!set || !found) return;
    input.onTool(found.tool);
    input.onPens({ ...pens, patterns: { ...pens.patterns, [found.tool]: found.pen } });
    input.onSketch({ type: 'put', points: set.laid.outline ?? [] });
    setSeed(set.laid.seed);
    setTakenUp({ set: setId, tool: found.tool });
  };
  return {
    errors: read?.errors ?? {},
    ofMounds,
    needsSketch,
    ready: layer !== undefined,
    busy: asked.isFetching,
    error: asked.error,
    laid,
    works: made?.works ?? noWorks,
    parked: parking.works,
    ...{ park, resume, placeParked },
    dropParked: parking.drop,
    chance: read?.pattern !== undefined && byChance.has(read.pattern.kind),
    again,
    place,
    layAgain: () => setSeed(newSeed()),
    takeUp,
  };
}

function worksOfSets(draft: OptionDraft, sets: readonly (string | undefined)[]) {
  const found = draft.works.filter(({ set }) => set !== undefined && sets.includes(set));
  return found.length > 0 ? new Set(found.map(({ id }) => id)) : undefined;
}
const hasSet = (draft: OptionDraft, id: string) => draft.sets.some((set) => set.id === id);
