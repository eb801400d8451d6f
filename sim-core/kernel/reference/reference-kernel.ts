import { exp, oneMinusExp } from '#sim-core/numeric/exp.ts';
import { grazerDecline } from '#sim-core/process/grazers.ts';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { processes } from '#sim-core/random/cell-luck.ts';
import { philox4x32, uniform } from '#sim-core/random/philox.ts';
import { coverOfClumps, type CreateKernel, type StepLosses } from '../kernel.ts';
import { createHerd } from './herd.ts';
import { neighbourhood } from './neighbourhood.ts';

/** Shares that 8 bits can hold, as 32-bit numbers: C is 32-bit and must not pass K. */
const shares = Float32Array.from({ length: 256 }, (_, byte) => byte / 255);

/**
 * The step of the model, written to be read beside its equations: q is recruitment, S the share that comes through.
 * One row at a time, in place; beside its state it keeps a few rows.
 */
export const createReferenceKernel: CreateKernel = (setup) => {
  const { width, height, mode, boundary, taps, step, rates, sites, luck, replicate, skip = true } = setup;
  const { capacity, vigour, exposure } = setup;
  const { carryOver, recruits, seedlings, years } = step;
  const { backgroundLoss, droughtLoss, lossWidth, tolerance, crowding } = rates;
  const { exposureShift, refugeShift, neighbourShift, refugeGrowth } = rates;
  const cells = width * height;
  const refuge = setup.refuge.slice();
  const cover = mode === 'mean-field' && setup.cover ? setup.cover.slice() : new Float32Array(cells);
  const clumps =
    mode === 'counts' ? (sites[255] < 65_536 ? new Uint16Array(cells) : new Uint32Array(cells)) : undefined;
  if (clumps && setup.clumps) {
    clumps.set(setup.clumps);
    for (let i = 0; i < cells; i++) cover[i] = coverOfClumps(capacity[i], clumps[i], sites[capacity[i]]);
  }
  const around = neighbourhood(cover, width, height, taps, boundary, skip);
  const herd = setup.grazing && createHerd(setup, setup.grazing, refuge);
  const fence = setup.grazing?.fence.slice();
  const grazingRate = setup.grazing?.rates.grazingRate ?? 0;
  /** the four random words of two neighbouring cells */
  const words = new Uint32Array(4);

  return {
    cover,
    clumps,
    grazers: herd?.grazers,
    fence,
    refugeAt: (cell) => refuge[cell],
    setRefuge(cell, value) {
      refuge[cell] = value;
    },
    changed() {
      // It looks at every cell of C in every step.
    },
    step(index: number, droughtIndex: number): StepLosses {
      const losses: StepLosses = { drought: 0, background: 0, grazing: 0 };
      const decline = setup.grazing ? grazerDecline(setup.grazing.rates, years, droughtIndex) : 0;
      let drawn = -1;
      for (let y = 0; y < height; y++) {
        const { values, from, to } = around.row(y);
        // Seedlings need no neighbour, so they visit the whole row.
        const first = seedlings > 0 ? 0 : from;
        const last = seedlings > 0 ? width : to;
        for (let x = first; x < last; x++) {
          const i = y * width + x;
          const k = capacity[i];
          if (k === 0) continue;
          const c = cover[i];
          const heard = x >= from && x < to ? values[x] : 0;
          if (skip && c === 0 && heard === 0 && seedlings === 0) continue;
          const K = shares[k];
          const E = exposure[i] / 255;
          const M = refuge[i] / 255;

          const phi = heard / K;
          const phi1 = phi < 1 ? phi : 1;
          let pressure = recruits * (vigour[i] / 255) * (1 + refugeGrowth * M);
          if (crowding > 0) pressure *= exp(-crowding * (1 - E) * phi1);
          const q = oneMinusExp(pressure * phi + seedlings);

          // X − X^c, in widths: X^c = X0 + a_E E − a_M M − a_N φ₁
          const margin =
            (droughtIndex - tolerance - exposureShift * E + refugeShift * M + neighbourShift * phi1) /
            lossWidth;
          const hazard = droughtLoss > 0 ? droughtLoss / (1 + exp(margin)) : 0;
          const grazing = herd && fence ? grazingRate * (1 - fence[i] / 255) * herd.grazers[i] : 0;
          const total = backgroundLoss + hazard + grazing;
          const S = exp(-total * years);

          const kept = carryOver * c;
          const before = kept + (K - kept) * q;
          if (total > 0) {
            const lost = before * (1 - S);
            losses.drought += (lost * hazard) / total;
            losses.background += (lost * backgroundLoss) / total;
            losses.grazing += (lost * grazing) / total;
          }
          if (!clumps) {
            const next = Math.fround(S * before);
            cover[i] = next < K ? next : K;
            continue;
          }
          const N = sites[k];
          const n = clumps[i];
          if (n === 0 && q === 0) continue;
          if (i >>> 1 !== drawn) {
            drawn = i >>> 1;
            philox4x32(words, drawn, index, replicate, processes.shoots, luck.k0, luck.k1);
          }
          const word = (i & 1) * 2;
          const next =
            binomialQuantile(uniform(words[word]), n, S * (carryOver + (1 - carryOver) * q)) +
            binomialQuantile(uniform(words[word + 1]), N - n, S * q);
          if (next !== n) {
            clumps[i] = next;
            cover[i] = coverOfClumps(k, next, N);
          }
        }
        herd?.advance(y, values, decline);
      }
      return losses;
    },
  };
};
