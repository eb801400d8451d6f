import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { fitKernel, frontSpeed } from '#sim-core/theory/fit-kernel.ts';
import { latticeSpeed, type Front } from '#sim-core/theory/lattice-speed.ts';
import { discreteGaussian, logMomentOfTaps } from '#sim-core/theory/spread-kernel.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { kernelSetup } from './setups.ts';

/**
 * Fronts of a kernel, in cells a step, against theory.
 *
 * A pulled front that starts as a step comes up to its speed slowly and always alike (Bramson 1983, Mem. AMS 44(285);
 * Ebert & van Saarloos 2000, Physica D 146:1–99): v(t) = v* − 3/(2θ*t) + (3√π/(2θ*²√D)) t^(−3/2) + …, with θ* the
 * decay of its edge and D = ½ θ* v″(θ*). Over the steps looked at here that lag is 0.2 to 1.5 % of v*, and the mean speed
 * must show it to a fifth. What may differ is the next term, of relative size 1/(θ*√(Dt)), 5 to 15 % of the lag; cover in
 * 32 bits, cut off near 1e−45, which slows a front by at most π²/(2 ln²(1e45)) = 0.05 %, after many more steps than
 * these (Brunet & Derrida 1997, Phys. Rev. E 56:2597); and the lattice, on which a front's place swings by less than a
 * hundredth of a cell in the 100 that it travels.
 */
const lagTolerance = 0.2;
/** Steps between which a speed is taken. */
interface Span {
  from: number;
  to: number;
}
const long: Span = { from: 200, to: 500 };
const short: Span = { from: 100, to: 250 };
/** Normals of fronts: cosine and sine of their angle to the rows. */
const rows = [1, 0] as const;
const diagonal = [Math.SQRT1_2, Math.SQRT1_2] as const;

interface Rates {
  fillRate: number;
  carryOver: number;
}

/** The front's theory with the taps as they are used, across rows at angle φ (cosine, sine). */
function theory(
  rates: Rates,
  stepsPerYear: number,
  taps: Float64Array,
  [cosine, sine]: readonly [number, number],
  { from, to }: Span,
) {
  const { carryOver, recruits } = stepRates({ ...rates, seedlingRate: 0 }, stepsPerYear);
  const logM = logMomentOfTaps(taps, cosine, sine);
  const front = latticeSpeed(carryOver, recruits, logM) as Front;
  const speedAt = (s: number) => Math.log(carryOver + recruits * Math.exp(logM(s))) / s;
  const h = front.decay * 1e-3;
  const bend = (speedAt(front.decay + h) - 2 * speedAt(front.decay) + speedAt(front.decay - h)) / (h * h);
  const { decay } = front;
  const diffusion = (decay / 2) * bend;
  // The mean of v(t) between two times is the difference of x(t) = v*t − 3/(2θ) ln t − (3√π/(θ²√D)) t^(−½).
  const place = (t: number) =>
    front.speed * t -
    (1.5 / decay) * Math.log(t) -
    (3 * Math.sqrt(Math.PI)) / (decay * decay * Math.sqrt(diffusion)) / Math.sqrt(t);
  return { limit: front.speed, mean: (place(to) - place(from)) / (to - from) };
}

/** Mean speed along a strip of one row, cells a step, from the cover that the front leaves behind. */
function measureStraight(
  createKernel: CreateKernel,
  rates: Rates,
  stepsPerYear: number,
  variance: number,
  guess: number,
): number {
  const { from, to } = long;
  const width = Math.ceil(guess * to * 1.05 + 60 + 8 * Math.sqrt(variance));
  const cover = new Float32Array(width).fill(1, 0, 20);
  const kernel = createKernel(
    kernelSetup({
      width,
      height: 1,
      cover,
      variance,
      stepsPerYear,
      rates: { ...rates, droughtLoss: 0 },
    }),
  );
  const settled = () => kernel.cover[0];
  const place = () => kernel.cover.reduce((sum, c) => sum + c, 0) / settled();
  let first = 0;
  for (let s = 0; s < to; s++) {
    kernel.step(s, 0);
    if (s + 1 === from) first = place();
  }
  return (place() - first) / (to - from);
}

/** The same across a square from a corner, measured on its diagonal, in cells a step of the front's normal. */
function measureDiagonal(createKernel: CreateKernel, rates: Rates, variance: number, guess: number): number {
  const { from, to } = short;
  const start = 60;
  const side = Math.ceil((guess * to * 1.1) / Math.SQRT2 + start);
  const cover = new Float32Array(side * side);
  for (let y = 0; y < side; y++) for (let x = 0; x + y < 2 * start && x < side; x++) cover[y * side + x] = 1;
  const kernel = createKernel(
    kernelSetup({ width: side, height: side, cover, variance, rates: { ...rates, droughtLoss: 0 } }),
  );
  const place = () => {
    let sum = 0;
    for (let d = 0; d < side; d++) sum += kernel.cover[d * side + d];
    return (sum / kernel.cover[0]) * Math.SQRT2;
  };
  let first = 0;
  for (let s = 0; s < to; s++) {
    kernel.step(s, 0);
    if (s + 1 === from) first = place();
  }
  return (place() - first) / (to - from);
}

/** Speeds of fronts on any kernel, against published laws. */
export function describeFrontSpeeds(name: string, createKernel: CreateKernel): void {
  describe(`${name}: front speeds`, () => {
    test.each([
      { fillRate: 1, carryOver: 0.7, stepsPerYear: 1, variance: 0.4 },
      { fillRate: 1, carryOver: 0, stepsPerYear: 1, variance: 2 },
      { fillRate: 0.5, carryOver: 0.9, stepsPerYear: 1, variance: 1 },
      { fillRate: 2, carryOver: 0.5, stepsPerYear: 4, variance: 0.3 },
      { fillRate: 3, carryOver: 0.2, stepsPerYear: 12, variance: 1.5 },
    ])('along the rows, the lattice formula v(0): %o', ({ stepsPerYear, variance, ...rates }) => {
      const { limit, mean } = theory(rates, stepsPerYear, discreteGaussian(variance), rows, long);
      const measured = measureStraight(createKernel, rates, stepsPerYear, variance, limit);
      expect(Math.abs(measured - mean)).toBeLessThan(lagTolerance * (limit - mean));
    });

    test.each([
      { fillRate: 1, carryOver: 0.7, variance: 0.1 },
      { fillRate: 0.7, carryOver: 0.3, variance: 0.4 },
    ])('along the diagonal, the lattice formula v(π/4): %o', ({ variance, ...rates }) => {
      const { limit, mean } = theory(rates, 1, discreteGaussian(variance), diagonal, short);
      const straight = theory(rates, 1, discreteGaussian(variance), rows, short).limit;
      const measured = measureDiagonal(createKernel, rates, variance, limit);
      expect(Math.abs(measured - mean)).toBeLessThan(lagTolerance * (limit - mean));
      // What it is held against is not the speed along the rows.
      expect(limit / straight).toBeLessThan(0.97);
    });

    test.each([
      { c: 0.5, fillRate: 0.2, cellSize: 0.1 },
      { c: 1, fillRate: 0.4, cellSize: 0.15 },
      { c: 0.3, fillRate: 0.1, cellSize: 0.1 },
    ])(
      'from what the user gives to a front, σ = 0 and a wide kernel: 2√(rD), Fisher 1937, %o',
      ({ c, fillRate, cellSize }) => {
        const rates = { fillRate, carryOver: 0 };
        const { variance, taps } = fitKernel({ ...rates, lateralSpread: c }, cellSize, 1);
        const fisher = 2 * Math.sqrt((fillRate * variance * cellSize * cellSize) / 2);
        expect(Math.abs(fisher / c - 1)).toBeLessThan(0.01);
        const { limit, mean } = theory(rates, 1, taps, rows, long);
        const measured = measureStraight(createKernel, rates, 1, variance, limit);
        // Bramson's lag is that of the lattice; the law is met once it is taken off, within 1 % for the finite θ*.
        expect(Math.abs(((measured + limit - mean) * cellSize) / fisher - 1)).toBeLessThan(0.01);
      },
    );

    test('adults that stay put: Neubert & Caswell 2000, Ecology 81:1613–1628, S = 0.5, B = 1.5, Gaussian', () => {
      // 1.062816174 a step and standard deviation, where the kernel is wide against its cells.
      const variance = 36;
      const rates = { fillRate: Math.log(2), carryOver: 0.5 };
      const { limit, mean } = theory(rates, 1, discreteGaussian(variance), rows, long);
      const measured = measureStraight(createKernel, rates, 1, variance, limit);
      expect(Math.abs((measured + limit - mean) / 6 / 1.062816174 - 1)).toBeLessThan(5e-3);
      expect(frontSpeed({ ...rates, lateralSpread: 1 }, 1, 1, variance) / 6).toBeCloseTo(1.0628, 2);
    });
  });
}
