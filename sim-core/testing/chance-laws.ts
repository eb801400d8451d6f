import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { stream } from '#sim-core/random/streams.ts';
import { latticeSpeed, type Front } from '#sim-core/theory/lattice-speed.ts';
import { discreteGaussian, logMomentOfTaps } from '#sim-core/theory/spread-kernel.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { kernelSetup } from './setups.ts';

/** Clump sites of every cell, by capacity byte. */
const sitesOf = (N: number) => new Uint32Array(256).fill(N, 1);

/** Laws of chance that a kernel must show, whatever it is written in. */
export function describeChanceLaws(name: string, createKernel: CreateKernel): void {
  describe(`${name}: laws of chance`, () => {
    /**
     * Families of single clumps, each in a cell that hears only itself. Clumps that are re-issued each step (σ = 0), with
     * R₀ = e^r recruits each on ample sites, have a Poisson number of successors, and a family dies out with chance
     * q = −W(−R₀ e^(−R₀))/R₀ (Harris 1963, The Theory of Branching Processes).
     */
    test.each([
      [1.2, 0.686301669],
      [1.5, 0.417188356],
      [2, 0.20318787],
      [3, 0.059520209],
    ])('a lone clump with %f successors a step dies out with chance %f', (successors, chance) => {
      const side = 50;
      const families = side * side;
      const sites = 20_000;
      const kernel = createKernel(
        kernelSetup({
          width: side,
          height: side,
          mode: 'counts',
          variance: 1e-9,
          sites: sitesOf(sites),
          clumps: new Uint32Array(families).fill(1),
          cover: new Float32Array(families).fill(1 / sites),
          rates: { carryOver: 0, fillRate: Math.log(successors), droughtLoss: 0 },
        }),
      );
      for (let step = 0; step < 30; step++) kernel.step(step, 0);
      const extinct = kernel.cover.reduce((sum, c) => sum + (c === 0 ? 1 : 0), 0) / families;
      // Four standard errors.
      expect(Math.abs(extinct - chance)).toBeLessThan(4 * Math.sqrt((chance * (1 - chance)) / families));
    });

    /**
     * A front of finitely many clumps is slower than that of a continuum, by π²γ²v″(γ) / (2 ln²N) where N is very large
     * (Brunet & Derrida 1997, Phys. Rev. E 56:2597). At the N of a cell ln N + 1.9 stands for ln N: so it was found for
     * normally spread plants with two successors and a front cut off below 1/N (computed, no printed table). A front
     * of clumps is not cut off so sharply: a band about the law is what can be asked, over a hundredfold of N.
     */
    test('the fewer clumps a cell holds, the slower the front, as Brunet and Derrida say', () => {
      const rates = { fillRate: Math.log(2), carryOver: 0 };
      const variance = 1;
      const { carryOver, recruits } = stepRates({ ...rates, seedlingRate: 0 }, 1);
      const logM = logMomentOfTaps(discreteGaussian(variance), 1, 0);
      const front = latticeSpeed(carryOver, recruits, logM) as Front;
      const speedAt = (s: number) => (Math.log(recruits) + logM(s)) / s;
      const h = front.decay * 1e-3;
      const bend = (speedAt(front.decay + h) - 2 * speedAt(front.decay) + speedAt(front.decay - h)) / (h * h);
      const slowing = (N: number) => {
        const order = Math.log(N) + 1.9;
        return (Math.PI ** 2 * front.decay ** 2 * bend) / (2 * order ** 2);
      };
      const speed = (N: number, strips: number) => {
        const [from, to] = [60, 260];
        const width = Math.ceil(front.speed * to + 60);
        let sum = 0;
        for (let replicate = 0; replicate < strips; replicate++) {
          const clumps = new Uint32Array(width).fill(N, 0, 20);
          const kernel = createKernel(
            kernelSetup({
              width,
              height: 1,
              mode: 'counts',
              variance,
              sites: sitesOf(N),
              clumps,
              cover: Float32Array.from(clumps, (n) => n / N),
              rates: { ...rates, droughtLoss: 0 },
              replicate,
            }),
          );
          // Where the front stands: the cells that hold at least half of what is held behind it.
          const place = () => kernel.cover.reduce((cells, c) => cells + c, 0) / settled;
          let first = 0;
          for (let step = 0; step < to; step++) {
            kernel.step(step, 0);
            if (step + 1 === from) first = place();
          }
          sum += (place() - first) / (to - from);
        }
        return sum / strips;
      };
      // Root of u = 1 − e^(−2u): what settles behind the front.
      const settled = 0.7968121;
      for (const [N, strips] of [
        [30, 40],
        [300, 24],
        [3000, 8],
      ]) {
        const found = (front.speed - speed(N, strips)) / slowing(N);
        expect(found, `${N} clumps a cell`).toBeGreaterThan(0.6);
        expect(found, `${N} clumps a cell`).toBeLessThan(1);
      }
    });

    describe('plant on random habitat reaches the far side where 8-neighbour habitat leads there, and only there', () => {
      // Habitat spans from a share of 1 − 0.5927 = 0.4073 on with 8 neighbours (Newman & Ziff 2000, Phys. Rev. Lett.
      // 85:4104), which are those that a kernel of radius 1 reaches.
      const size = 32;
      const maps = 30;
      const radiusOne = 1e-3;
      function spread(habitat: Uint8Array): boolean {
        const cover = Float32Array.from(habitat, (h, i) => (h && i % size === 0 ? 1 : 0));
        const kernel = createKernel(
          kernelSetup({
            width: size,
            height: size,
            capacity: habitat.map((h) => h * 255),
            cover,
            variance: radiusOne,
            rates: { fillRate: 3, carryOver: 1, droughtLoss: 0 },
          }),
        );
        for (let reached = -1, now = 0, step = 0; now !== reached;) {
          reached = now;
          for (let i = 0; i < 12; i++) kernel.step(step++, 0);
          now = kernel.cover.reduce((cells, c) => cells + (c > 0 ? 1 : 0), 0);
        }
        return kernel.cover.some((c, i) => c > 0 && i % size === size - 1);
      }
      /** Flooding from the left side over 8 neighbours. */
      function leadsThere(habitat: Uint8Array): boolean {
        const left = habitat.slice();
        const queue: number[] = [];
        for (let y = 0; y < size; y++) if (left[y * size]) queue.push(y * size);
        for (const cell of queue) left[cell] = 0;
        for (let cell = queue.pop(); cell !== undefined; cell = queue.pop()) {
          const [x, y] = [cell % size, Math.floor(cell / size)];
          if (x === size - 1) return true;
          for (let dy = -1; dy <= 1; dy++)
            for (let dx = -1; dx <= 1; dx++) {
              const next = cell + dy * size + dx;
              if (y + dy < 0 || y + dy >= size || x + dx < 0 || !left[next]) continue;
              left[next] = 0;
              queue.push(next);
            }
        }
        return false;
      }

      test.each([
        [0.33, 0, 0.15],
        [0.4073, 0.2, 0.8],
        [0.48, 0.85, 1],
      ])('habitat share %f', (share, least, most) => {
        const random = stream(`habitat ${share}`, 'parameters');
        let spanning = 0;
        for (let map = 0; map < maps; map++) {
          const habitat = Uint8Array.from({ length: size * size }, () => (random() < share ? 1 : 0));
          const crossed = spread(habitat);
          expect(crossed).toBe(leadsThere(habitat));
          if (crossed) spanning++;
        }
        expect(spanning / maps).toBeGreaterThanOrEqual(least);
        expect(spanning / maps).toBeLessThanOrEqual(most);
      });
    });
  });
}
