import type { Mode } from '#sim-core/spec/run-spec.ts';
import type { RunProgress } from '#app/workers/run-loop.ts';

/**
 * Seconds that a million cells take a step, until this browser's own are known: what a year took in Node on one core of a
 * small server with its measures and the packing of its frame (0.08 s of processor time by mean field, 0.14 s in counts,
 * over 6 years of 1,000 × 1,000 cells), and half more for a browser that has other things to do. Rough, and said as “about”.
 */
const startingPace: Record<Mode, number> = { 'mean-field': 0.12, counts: 0.2 };
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
