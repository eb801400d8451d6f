import type { ElevationCurves, TidalDatum } from '#contract/layers.ts';
import { heightAt, type SiteHeights } from './elevation-facts.ts';

/** Levels of the tide that curves are usually drawn against. */
export const usualDatums = [
  'mean low water',
  'mean sea level',
  'mean high water',
  'mean higher high water',
] as const;

/** Where a starting curve hangs: on named levels of the tide, or on the site's own heights where those are not known. */
export interface Anchors {
  readonly low: number;
  readonly middle: number;
  readonly high: number;
  /** whether all three are levels of the tide: else why not */
  readonly levels: 'given' | 'missing' | 'out of order';
}

/** Mean low water, mean sea level and mean high water; where one is not given or they are out of order, the 10, 50 and 90 % of the site's cells. */
export function anchorsOf(heights: SiteHeights, datums: readonly TidalDatum[]): Anchors {
  const level = (name: string) => datums.find((datum) => datum.name.trim().toLowerCase() === name)?.height;
  const [low, middle, high] = [level(usualDatums[0]), level(usualDatums[1]), level(usualDatums[2])];
  const given = low !== undefined && middle !== undefined && high !== undefined;
  if (given && low < middle && middle < high) return { low, middle, high, levels: 'given' };
  return {
    low: heightAt(heights, 0.1),
    middle: heightAt(heights, 0.5),
    high: heightAt(heights, 0.9),
    levels: given ? 'out of order' : 'missing',
  };
}

/** Where a new level of the tide stands until somebody says: above all that are there, so that none is taken for another, m. */
export const nextLevel = (datums: readonly TidalDatum[], startAt: number): number =>
  datums.length === 0
    ? startAt
    : Math.min(100, Math.round(100 * (Math.max(...datums.map(({ height }) => height)) + 0.5)) / 100);

export const startingCurves = ['salt-marsh grass', 'seagrass'] as const;
export type StartingCurve = (typeof startingCurves)[number];

/**
 * Curves to start from, for people to change: a salt-marsh grass stands between mean sea level and mean high water and
 * is stressed above it; a seagrass stands below mean sea level and is stressed where it falls dry (common practice, no
 * source). Heights to the centimetre, each above the one before.
 */
export function startingPoint(of: StartingCurve, { low, middle, high }: Anchors): ElevationCurves {
  const range = Math.max(0.1, high - low);
  const curve = (...points: [number, number][]) => {
    const rounded: [number, number][] = [];
    for (const [height, share] of points) {
      const before = rounded.at(-1)?.[0] ?? -Infinity;
      rounded.push([Math.max(Math.round(height * 100), Math.round(before * 100) + 1) / 100, share]);
    }
    return rounded;
  };
  if (of === 'seagrass')
    return {
      capacity: curve([low - 0.75 * range, 0], [low - 0.25 * range, 1], [low, 1], [middle, 0]),
      vigour: null,
      exposure: curve([low, 0], [middle, 1]),
    };
  return {
    capacity: curve(
      [middle - 0.1 * range, 0],
      [middle + 0.15 * range, 1],
      [high, 1],
      [high + 0.25 * range, 0.3],
    ),
    vigour: null,
    exposure: curve([high, 0], [high + 0.35 * range, 1]),
  };
}
