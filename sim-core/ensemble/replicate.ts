import { checkOfRun, type CheckedYear } from '#sim-core/fit/fit-check.ts';
import { figuresOfRun, yearsOfTarget, type FitTarget } from '#sim-core/fit/fit-target.ts';
import { createRun, type RunInput, type YearOutcome } from '#sim-core/run/create-run.ts';
import { toFrame } from '#sim-core/run/frame.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';

/** What is kept of a run beside its result. */
export interface Keep {
  readonly closing: boolean;
  /** years whose cover is kept, the survey's included */
  readonly coverYears?: readonly number[];
  /** years whose cover is kept in 8 bits, the survey's included: next to free where the run reports the year */
  readonly frameYears?: readonly number[];
  /** what the run is compared with where it stands; the covers that this needs are not kept by it */
  readonly fit?: { readonly target: FitTarget; readonly want: 'figures' | 'check' };
}

/** What a run of an ensemble came to. */
export interface ReplicateOutcome {
  readonly result: RunResult;
  /** Int16, row-major: 0 still open, −32768 cannot hold the plant */
  readonly closing: Int16Array | undefined;
  /** C of the kept years, Float32, row-major */
  readonly covers: ReadonlyMap<number, Float32Array>;
  /** round(255·C) of the kept years, row-major */
  readonly frames: ReadonlyMap<number, Uint8Array>;
  /** in the order of `observedFigures`, where they were wanted */
  readonly figures?: readonly number[];
  /** a map each, where the run was to be checked */
  readonly checked?: readonly CheckedYear[];
}

/**
 * Runs a specification to its horizon.
 *
 * @param onStep told after each step how many are done
 * @throws RunProblem naming each field that makes the run impossible
 */
export function runReplicate(input: RunInput, keep: Keep, onStep?: (done: number) => void): ReplicateOutcome {
  const run = createRun(input);
  const compared = new Set(keep.fit ? yearsOfTarget(keep.fit.target) : []);
  const ofCover = new Set(keep.coverYears);
  const ofFrame = new Set(keep.frameYears);
  const covers = new Map<number, Float32Array>();
  const frames = new Map<number, Uint8Array>();
  for (let at: YearOutcome | undefined = run.survey; at; at = run.nextYear(onStep)) {
    if (ofCover.has(at.year) || compared.has(at.year)) covers.set(at.year, run.cover());
    if (ofFrame.has(at.year)) frames.set(at.year, at.frame ?? toFrame(run.cover()));
  }
  const told = keep.fit && compare(keep.fit, covers, input.ground.capacity);
  for (const year of compared) if (!ofCover.has(year)) covers.delete(year);
  return { result: run.result(), closing: keep.closing ? run.closing() : undefined, covers, frames, ...told };
}

function compare(
  { target, want }: NonNullable<Keep['fit']>,
  covers: ReadonlyMap<number, Float32Array>,
  capacity: Uint8Array,
): Pick<ReplicateOutcome, 'figures' | 'checked'> {
  const coverOf = (year: number) => covers.get(year)!;
  return want === 'figures'
    ? { figures: figuresOfRun(target, coverOf, capacity) }
    : { checked: checkOfRun(target, coverOf, capacity) };
}

/** Buffers of the maps of an outcome, to be handed over from one thread to the next. */
export const buffersOf = ({ closing, covers, frames, checked = [] }: ReplicateOutcome): ArrayBuffer[] =>
  [closing, ...covers.values(), ...frames.values(), ...checked.map(({ stands }) => stands)].flatMap((map) =>
    map ? [map.buffer as ArrayBuffer] : [],
  );
