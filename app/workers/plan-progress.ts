import type { FootholdKind, SuggestProgress } from '#sim-core/plan/suggest.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import type { QuickLookStart } from './quick-look-desk.ts';

/** What a suggestion, or a map of what one more foothold brings, starts from. */
export interface PlanRequest {
  readonly start: QuickLookStart;
  /** works that stand already */
  readonly works: readonly Action[];
  readonly foothold: FootholdKind;
  /** most places that are weighed against each other; 400 unless said */
  readonly candidates?: number;
}

export interface PlanProgress extends SuggestProgress {
  /** of this stage, from the pace so far; undefined until something is done */
  readonly secondsLeft: number | undefined;
}

/** Least time between two words, milliseconds. */
const pause = 100;

/** Runs work that yields its progress to its end, and tells how far it is, ten times a second at most. */
export function followProgress<T>(
  work: Generator<SuggestProgress, T>,
  tell: (progress: PlanProgress) => void,
  now: () => number,
): T {
  let stage: SuggestProgress['stage'] | undefined;
  let [since, told] = [0, -Infinity];
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
    const progress = step.value;
    const time = now();
    if (progress.stage !== stage) [stage, since, told] = [progress.stage, time, -Infinity];
    if (time - told < pause) continue;
    told = time;
    const { done, of } = progress;
    const secondsLeft = done > 0 ? ((time - since) / 1000 / done) * (of - done) : undefined;
    tell({ ...progress, secondsLeft });
  }
}
