import { latinDraws } from '#sim-core/belief/rates-of-run.ts';
import { fitKernel, quantiles, stepRates } from '#sim-core/index.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import { spreadProblems } from '#sim-core/theory/fit-kernel.ts';
import { latticeSpeed } from '#sim-core/theory/lattice-speed.ts';
import { logMomentOfTaps } from '#sim-core/theory/spread-kernel.ts';
import { fillCurve, yearsToFill } from './implied.ts';

/** What is asked: the rates, and what is believed of those that are not known. */
export interface ImpliedQuestion {
  readonly rates: Rates;
  readonly beliefs: Beliefs;
  readonly cellSize: number;
  readonly stepsPerYear: StepsPerYear;
}

/** The 5, 50 and 95 % quantiles over the draws. */
export interface Band {
  readonly low: number;
  readonly middle: number;
  readonly high: number;
}

/** What the rates come to on cells of one size, over many draws of what is believed. */
export interface ImpliedDraws {
  readonly draws: number;
  /** draws that no kernel can show on these cells; they are left out of the front's figures alone */
  readonly refused: number;
  /** front speed, m/yr, by direction; null where every draw is refused */
  readonly speeds: readonly { readonly degrees: number; readonly speed: Band }[] | null;
  /** cover of good ground at the end of each year from 1 % on */
  readonly fill: readonly Band[];
  /** years until half full; Infinity where that takes longer than the curve */
  readonly yearsToHalf: Band;
  /** index at which half of the drought loss acts */
  readonly halfLoss: { readonly open: Band; readonly refuge: Band };
}

/** Draws that are shown: enough that the 5 and 95 % quantiles stand still to about a tenth of their distance. */
const draws = 200;
/** Directions between a row and the diagonal; the lattice is the same in the other seven eighths. */
export const directions = [0, 7.5, 15, 22.5, 30, 37.5, 45];

/** Works it all out, by the engine's own functions. Takes a second or so: call it off the page's thread. */
export function impliedDraws({ rates, beliefs, cellSize, stepsPerYear }: ImpliedQuestion): ImpliedDraws {
  const rows = latinDraws('what is implied', draws, beliefs).map((drawn) => ({ ...rates, ...drawn }));
  const fronts = rows.flatMap((row) => {
    if (spreadProblems(row, cellSize, stepsPerYear).length > 0) return [];
    return [frontByDirection(row, cellSize, stepsPerYear)];
  });
  const curves = rows.map((row) => fillCurve(row, stepsPerYear));
  return {
    draws,
    refused: draws - fronts.length,
    speeds:
      fronts.length === 0
        ? null
        : directions.map((degrees, i) => ({ degrees, speed: bandOf(fronts.map((front) => front[i])) })),
    fill: curves[0].map((_, year) => bandOf(curves.map((curve) => curve[year]))),
    yearsToHalf: bandOf(curves.map((curve) => yearsToFill(curve, 0.5))),
    halfLoss: {
      open: bandOf(rows.map((row) => row.tolerance)),
      refuge: bandOf(rows.map((row) => row.tolerance - row.refugeShift)),
    },
  };
}

/** Speed of a straight front of the kernel as cut, m/yr, in each of the `directions`. */
export function frontByDirection(rates: Rates, cellSize: number, stepsPerYear: StepsPerYear): number[] {
  const { taps } = fitKernel(rates, cellSize, stepsPerYear);
  const { carryOver, recruits } = stepRates({ ...rates, seedlingRate: 0 }, stepsPerYear);
  return directions.map((degrees) => {
    const angle = (degrees / 180) * Math.PI;
    const front = latticeSpeed(carryOver, recruits, logMomentOfTaps(taps, Math.cos(angle), Math.sin(angle)));
    return (front?.speed ?? 0) * cellSize * stepsPerYear;
  });
}

function bandOf(values: readonly number[]): Band {
  // Quantiles between a number and Infinity are no numbers, so the far end counts as Infinity itself.
  const [low, middle, high] = quantiles(values, [0.05, 0.5, 0.95]).map((x) =>
    Number.isNaN(x) ? Infinity : x,
  );
  return { low, middle, high };
}
