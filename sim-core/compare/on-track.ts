import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { bare, standing, unknown } from '#sim-core/fit/map-agreement.ts';

export type Track = 'ahead' | 'on track' | 'behind';

/** Where a newer survey lies among the futures of an ensemble. */
export interface Standing {
  readonly track: Track;
  /** share of futures that cover less in that year, those that cover as much counted half */
  readonly shareBelow: number;
  /** middle nine tenths of the futures, m² */
  readonly low: number;
  readonly middle: number;
  readonly high: number;
}

/**
 * A survey is on track where the middle nine tenths of the futures hold it (common practice, no source).
 *
 * @param surveyed covered area, m²
 * @param futures covered area of each future in the same year, m², at least one
 */
export function standingAmong(surveyed: number, futures: readonly number[]): Standing {
  const [low, middle, high] = quantiles(futures, [0.05, 0.5, 0.95]);
  const below = futures.reduce((sum, area) => sum + (area < surveyed ? 1 : area === surveyed ? 0.5 : 0), 0);
  return {
    track: surveyed > high ? 'ahead' : surveyed < low ? 'behind' : 'on track',
    shareBelow: below / futures.length,
    low,
    middle,
    high,
  };
}

/** What a cell of a newer survey is against the ensemble. */
export const asExpected = 0;
export const aheadThere = 1;
export const behindThere = 2;
export const notSurveyed = 255;

/** A map of a newer survey against the ensemble, and how many cells are what. */
export interface PlacesOffTrack {
  /** row-major: `asExpected`, `aheadThere`, `behindThere` or `notSurveyed` */
  readonly cells: Uint8Array;
  readonly ahead: number;
  readonly behind: number;
  readonly expected: number;
}

/**
 * Cells that stand though hardly any future had them stand, and cells that are bare though nearly all had them stand:
 * nineteen of twenty either way.
 *
 * @param survey `bare`, `standing` or `unknown`, row-major
 * @param chance chance that the cell stands by that year in bytes, k/255, row-major
 */
export function placesOffTrack(survey: Uint8Array, chance: Uint8Array): PlacesOffTrack {
  const rare = 0.05 * 255;
  let ahead = 0;
  let behind = 0;
  let expected = 0;
  const cells = Uint8Array.from(survey, (value, i) => {
    if (value === unknown) return notSurveyed;
    if (value === standing && chance[i] <= rare) {
      ahead++;
      return aheadThere;
    }
    if (value === bare && chance[i] >= 255 - rare) {
      behind++;
      return behindThere;
    }
    expected++;
    return asExpected;
  });
  return { cells, ahead, behind, expected };
}
