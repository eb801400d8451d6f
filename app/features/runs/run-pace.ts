import type { Mode } from '#sim-core/spec/run-spec.ts';
import type { RunProgress } from '#app/workers/run-loop.ts';

/**
 * Seconds that a million cells take a step, until this browser's own are known: what the engine took in Node on one core
 * of a small server (0.15 s of processor time by mean field, 0.20 s in counts, over 3 years of 1,000 × 1,000 cells), and
 * a good half more for packing frames and for a browser that has other things to do. Rough, and said as “about”.
 */
const startingPace: Record<Mode, number> = { 'mean-field': 0.23, counts: 0.3 };
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
