import type { Mode } from '#sim-core/spec/run-spec.ts';
import type { RunProgress } from '#app/workers/run-loop.ts';

/** Seconds that a million cells take a step, measured in Chromium on one core of a small server, until this browser's own are known. */
const startingPace: Record<Mode, number> = { 'mean-field': 0.12, counts: 0.3 };
const keyOf = (mode: Mode) => `foothold.pace.${mode}`;

/** Learns from a run how fast this browser is. */
export function keepPace(mode: Mode, cells: number, { stepsDone, steps, secondsLeft }: RunProgress): void {
  if (secondsLeft === undefined || stepsDone >= steps) return;
  const pace = (secondsLeft / (steps - stepsDone) / cells) * 1e6;
  try {
    window.localStorage.setItem(keyOf(mode), String(pace));
  } catch {
    // Without storage the starting pace stays the estimate.
  }
}

function pace(mode: Mode): number {
  try {
    const kept = Number(window.localStorage.getItem(keyOf(mode)));
    return kept > 0 ? kept : startingPace[mode];
  } catch {
    return startingPace[mode];
  }
}

/** Seconds that a run is likely to take on this browser. */
export const estimateSeconds = (mode: Mode, cells: number, steps: number): number =>
  (pace(mode) * cells * steps) / 1e6;
