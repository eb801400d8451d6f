import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { StepsPerYear } from '#sim-core/spec/run-spec.ts';
import { fillTime } from './fill-time.ts';
import { fitKernel, frontSpeed } from './fit-kernel.ts';
import { referenceShare } from './reference-cover.ts';
import { stepRates } from './step-rates.ts';

/** The rates that growth without losses follows. */
export type GrowthRates = Pick<
  Rates,
  'lateralSpread' | 'fillRate' | 'carryOver' | 'seedlingRate' | 'refugeGrowth'
>;

/** What a kind of ground, one vigour and one strength of refuge, makes of growth. */
export interface LocalGrowth {
  /** of a straight front, m/yr; 0 where none advances */
  readonly speed: number;
  /** years to half its reference from a share of its capacity */
  readonly fill: (from: number) => number;
  /** the same from the share at which a cell counts as occupied */
  readonly fromOccupied: number;
}

/**
 * The growth of each kind of ground, worked out once a kind.
 *
 * @returns function of the vigour's and the refuge's byte
 */
export function localGrowth(
  rates: GrowthRates,
  cellSize: number,
  stepsPerYear: StepsPerYear,
): (vigour: number, refuge: number) => LocalGrowth {
  const { variance } = fitKernel(rates, cellSize, stepsPerYear);
  const step = stepRates(rates, stepsPerYear);
  const known = new Array<LocalGrowth | undefined>(65_536);
  return (vigour, refuge) => {
    const kind = vigour * 256 + refuge;
    const found = known[kind];
    if (found) return found;
    const growth = (vigour / 255) * (1 + rates.refugeGrowth * (refuge / 255));
    const half = referenceShare(step, vigour / 255) / 2;
    const fill = (from: number) => fillTime(step, growth, from, half);
    const local = {
      speed: half > 0 ? frontSpeed(rates, cellSize, stepsPerYear, variance, 'straight', growth) : 0,
      fill,
      fromOccupied: fill(occupiedFrom),
    };
    known[kind] = local;
    return local;
  };
}
