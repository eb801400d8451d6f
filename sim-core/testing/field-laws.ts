import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { createRun } from '#sim-core/run/create-run.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import type { RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { gridOf, groundOf, kernelSetup, specOf } from './setups.ts';

/** Rates typical of salt-marsh grass on open mud: 0.8 m/yr sideways (Feist & Simenstad 2000, Estuaries 23:267–274). */
const marshGrass: Rates = { ...defaultRates, lateralSpread: 0.8, fillRate: 1.5 };
const cover = 0.9;

/** Whether a cell (column, row) of a map is of some kind. */
type Where = (x: number, y: number) => boolean;

interface Site {
  readonly width: number;
  readonly height: number;
  readonly cellSize?: number;
  readonly standing: Where;
  readonly refuge?: Where;
}

/** The cells of a map, row-major, that are of some kind. */
const cellsWhere = ({ width, height }: Site, where: Where): boolean[] =>
  Array.from({ length: width * height }, (_, i) => where(i % width, Math.floor(i / width)));

/** A run of a site to its end. */
function ran(createKernel: CreateKernel, site: Site, given: Partial<RunSpecInput>) {
  const { width, height, cellSize = 1, standing, refuge = () => false } = site;
  const run = createRun(
    {
      spec: specOf({ mode: 'mean-field', surveyYear: 2000, ...given }),
      grid: gridOf(width, height, cellSize),
      ground: groundOf(width * height, {
        cover: Float32Array.from(cellsWhere(site, standing), (stands) => (stands ? cover : 0)),
        refuge: Uint8Array.from(cellsWhere(site, refuge), (shelters) => (shelters ? 255 : 0)),
      }),
    },
    createKernel,
  );
  while (run.nextYear());
  return run;
}

/** Years from the survey until 0.9 of the reference stands. */
function recoveryTime(createKernel: CreateKernel, site: Site, years: number): number {
  const run = ran(createKernel, site, { years, rates: marshGrass, reportYears: [2000] });
  const year = run.result().recoveredYear;
  if (year === null) throw new Error(`Not recovered within ${years} years`);
  return year - 2000;
}

/** What practitioners see in the field and the model must show: common practice, no source. */
export function describeFieldLaws(name: string, createKernel: CreateKernel): void {
  describe(`${name}: laws of the field`, () => {
    describe('a die-off between two standing stands, 36, 72 and 144 m wide', () => {
      const margin = 10;
      /** Mounds of 2 m × 2 m, one on each 18 m × 18 m: 1.2 % of the ground, each with what it sheltered. */
      const onMound: Where = (x, y) => (x - margin + 9) % 18 < 2 && (y + 9) % 18 < 2;
      const times = (mounds: boolean) =>
        [36, 72, 144].map((wide) => {
          const width = wide + 2 * margin;
          const inside: Where = (x) => x >= margin && x < width - margin;
          const mound: Where = (x, y) => mounds && inside(x, y) && onMound(x, y);
          const standing: Where = (x, y) => !inside(x, y) || mound(x, y);
          return recoveryTime(createKernel, { width, height: 18, standing, refuge: mound }, 120);
        });

      test('without refuges, the wider it is the longer it takes', () => {
        const [narrow, middle, wide] = times(false);
        // The last 72 m close from both sides at 0.8 m/yr, 45 years; the target leaves the last tenth open.
        expect(wide - middle).toBeGreaterThan(36);
        expect(wide - middle).toBeLessThan(46);
        expect(middle - narrow).toBeGreaterThan(17);
      });

      test('with refuges on 1 % of it, it takes 10 to 15 years, however wide', () => {
        const [narrow, middle, wide] = times(true);
        for (const years of [narrow, middle, wide]) {
          expect(years).toBeGreaterThanOrEqual(10);
          expect(years).toBeLessThanOrEqual(15);
        }
        expect(wide - narrow).toBeLessThanOrEqual(2);
      });
    });

    test('after a drought that kills open ground, about 98 % of what is left stands on refuges', () => {
      // A full stand, a sixteenth of it on refuges, under three years of extreme drought.
      const site: Site = {
        width: 48,
        height: 48,
        cellSize: 2,
        standing: () => true,
        refuge: (x, y) => x % 8 < 2 && y % 8 < 2,
      };
      const left = ran(createKernel, site, { years: 3, droughtIndex: -4, rates: defaultRates }).cover();
      const sheltered = cellsWhere(site, site.refuge!);
      const sum = (of: (i: number) => boolean) => left.reduce((all, c, i) => all + (of(i) ? c : 0), 0);
      const onRefuges = sum((i) => sheltered[i]);
      expect(sum((i) => !sheltered[i]) / (0.9 * left.length)).toBeLessThan(0.01);
      expect(onRefuges / sum(() => true)).toBeGreaterThan(0.97);
      expect(onRefuges / sum(() => true)).toBeLessThan(0.995);
    });

    describe('a lone, thin clump', () => {
      /** Share of thin cover on a map that one step leaves, and adds. */
      const step = (refuge: number, droughtIndex: number, rates: Partial<Rates>) => {
        const thin = 1e-4;
        const setup = kernelSetup({
          width: 4,
          height: 4,
          refuge: new Uint8Array(16).fill(refuge),
          cover: new Float32Array(16).fill(thin),
          rates,
        });
        const kernel = createKernel(setup);
        kernel.step(0, droughtIndex);
        return kernel.cover[5] / thin;
      };

      test('grows about twice as much on a refuge', () => {
        const gain = (refuge: number) => step(refuge, 6, { carryOver: 0.7 }) - 0.7;
        expect(gain(255) / gain(0)).toBeGreaterThan(1.95);
        expect(gain(255) / gain(0)).toBeLessThan(2.05);
      });

      test('bears an index down to −4.2 on a refuge, −2.3 elsewhere: there half of the drought loss acts', () => {
        // On ground where nothing is re-issued or added, all that a step changes is the loss.
        const still = { carryOver: 1, fillRate: 0.01 };
        const halfLoss = (refuge: number) => {
          const spared = step(refuge, 8, still);
          let [dry, wet] = [-8, 2];
          while (wet - dry > 1e-3) {
            const middle = (dry + wet) / 2;
            const hazard = -Math.log(step(refuge, middle, still) / spared);
            if (hazard > defaultRates.droughtLoss / 2) dry = middle;
            else wet = middle;
          }
          return wet;
        };
        expect(halfLoss(0)).toBeCloseTo(-2.3, 1);
        expect(halfLoss(255)).toBeCloseTo(-4.2, 1);
      });
    });

    describe('36 clumps planted touching, in four blocks, or spaced 5 m apart', () => {
      const side = 60;
      const touching = [15, 42].flatMap((y) => [15, 42].flatMap((x) => block(x, y)));
      const spaced = Array.from(
        { length: 36 },
        (_, i) => (5 + 10 * Math.floor(i / 6)) * side + 5 + 10 * (i % 6),
      );
      /** The three by three cells whose corner stands at (x, y). */
      function block(x: number, y: number): number[] {
        return Array.from({ length: 9 }, (_, i) => (y + Math.floor(i / 3)) * side + x + (i % 3));
      }
      const cellSize = 0.5;
      // Where crowded clumps recruit less.
      const rates: Rates = { ...defaultRates, crowding: 1 };
      const { variance } = fitKernel(rates, cellSize, 1);

      /** Clumps after two years a clump planted, on average over the replicates; a cell holds one clump. */
      const standing = (
        mode: 'mean-field' | 'counts',
        planted: number[],
        exposure: number,
        droughtIndex: number,
        replicates = 1,
      ) => {
        let sum = 0;
        for (let replicate = 0; replicate < replicates; replicate++) {
          const clumps = new Uint32Array(side * side);
          for (const cell of planted) clumps[cell] = 1;
          const kernel = createKernel(
            kernelSetup({
              width: side,
              height: side,
              mode,
              cellSize,
              variance,
              exposure: new Uint8Array(side * side).fill(exposure),
              cover: Float32Array.from(clumps),
              clumps,
              rates,
              replicate,
            }),
          );
          for (let year = 0; year < 2; year++) kernel.step(year, droughtIndex);
          sum += kernel.cover.reduce((all, c) => all + c, 0);
        }
        return sum / planted.length / replicates;
      };

      test.each([
        ['mean-field', 1],
        ['counts', 60],
      ] as const)(
        'touching ones come through twice as well where it is exposed, spaced ones where it is benign (%s)',
        (mode, replicates) => {
          const ratio = (exposure: number, index: number) =>
            standing(mode, touching, exposure, index, replicates) /
            standing(mode, spaced, exposure, index, replicates);
          expect(ratio(204, -1)).toBeGreaterThan(1.7);
          expect(ratio(204, -1)).toBeLessThan(2.5);
          expect(ratio(0, 0)).toBeLessThan(0.6);
        },
      );
    });

    test('many small remnants regrow faster than one of the same area', () => {
      const side = 48;
      const within = (x: number, y: number, from: number, size: number) =>
        x >= from && x < from + size && y >= from && y < from + size;
      const one = recoveryTime(
        createKernel,
        { width: side, height: side, standing: (x, y) => within(x, y, 20, 8) },
        100,
      );
      // 16 of 2 m × 2 m on a lattice of 12 m.
      const many = recoveryTime(
        createKernel,
        { width: side, height: side, standing: (x, y) => within(x % 12, y % 12, 5, 2) },
        100,
      );
      expect(one).toBeGreaterThan(2 * many);
    });
  });
}
