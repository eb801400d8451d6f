import { exp } from '#sim-core/numeric/exp.ts';
import type { Grazing } from '#sim-core/process/grazers.ts';
import type { KernelSetup } from '../kernel.ts';
import { neighbourhood } from './neighbourhood.ts';

/** Grazers of a map, a row at a time, in place. */
export interface Herd {
  /** G, 1/m² */
  readonly grazers: Float32Array;
  /**
   * G' = min(G_max, (T_G * G) e^(Δt (f φ₁ − m − p (1 − D) − p_M M)) + ι Δt) of row y. Rows come in order, 0 first.
   *
   * @param heard Φ of the plants in this row
   * @param decline −Δt (m + p (1 − D)), `grazerDecline`
   */
  advance(y: number, heard: Float64Array, decline: number): void;
}

/** @param refuge M as the kernel holds it */
export function createHerd(
  { width, height, boundary, capacity, step }: KernelSetup,
  { rates, taps }: Grazing,
  refuge: Uint8Array,
): Herd {
  const { grazerLimit } = rates;
  const grazers = new Float32Array(width * height).fill(Math.min(rates.initialGrazers, grazerLimit));
  const around = neighbourhood(grazers, width, height, taps, boundary, false);
  const growth = rates.grazerGrowth * step.years;
  const refugeLoss = rates.refugePredation * step.years;
  const arrivals = rates.grazerImmigration * step.years;
  return {
    grazers,
    advance(y, heard, decline) {
      const { values } = around.row(y);
      for (let x = 0; x < width; x++) {
        const i = y * width + x;
        const k = capacity[i];
        const phi1 = k > 0 ? Math.min(1, heard[x] / Math.fround(k / 255)) : 0;
        const change = exp(growth * phi1 + decline - refugeLoss * (refuge[i] / 255));
        grazers[i] = Math.min(grazerLimit, values[x] * change + arrivals);
      }
    },
  };
}
