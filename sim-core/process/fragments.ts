import { mirrored } from '#sim-core/grid/mirrored.ts';
import { direction } from '#sim-core/numeric/direction.ts';
import { log } from '#sim-core/numeric/log.ts';
import { processes } from '#sim-core/random/cell-luck.ts';
import { philox4x32, uniform } from '#sim-core/random/philox.ts';
import { poissonQuantile } from '#sim-core/random/poisson.ts';
import type { PhiloxKey } from '#sim-core/random/streams.ts';
import type { FragmentRates } from '#sim-core/spec/process-parameters.ts';
import type { Boundary } from '#sim-core/spec/run-spec.ts';
import { setClumps, type WorksMap } from './works-map.ts';

/** The map on which pieces break off and land. Lengths in metres, time in years. */
export interface FragmentMap extends Pick<WorksMap, 'kernel' | 'capacity' | 'sites' | 'replicate'> {
  readonly width: number;
  readonly height: number;
  readonly cellSize: number;
  readonly boundary: Boundary;
  /** Δt, yr */
  readonly years: number;
  /** key of the purpose `fragments` */
  readonly luck: PhiloxKey;
}

/**
 * Pieces that break off in one step and take free sites where they land (counts mode): from each cell Poisson(ρ Δt C Δx²)
 * of them, so all in all Poisson(ρ Δt ΣC Δx²), each from a cell in proportion to its cover. A piece starts anywhere in its
 * cell and goes in any direction over an exponential distance of mean L; it lands on one of its cell's N sites, each as
 * likely, and takes it where it is free. Off the map it is lost with boundary `bare` and folded back with `mirror`.
 *
 * Draws, all from the key of the purpose: how many from the block (cell >> 2, step, replicate, fragments), a word a cell;
 * a piece's flight from (cell, step, replicate, flights + (piece << 8)): direction, distance, start (16 bits an axis), site.
 *
 * @param index step from the survey on: part of the counter of every draw
 * @returns pieces that took root
 */
export function scatterFragments(
  { fragmentRate, fragmentDistance }: FragmentRates,
  index: number,
  map: FragmentMap,
): number {
  const { kernel, capacity, sites, width, height, cellSize, boundary, luck, replicate } = map;
  const { cover, clumps } = kernel;
  if (!clumps || fragmentRate === 0) return 0;
  const piecesOfFullCell = fragmentRate * map.years * cellSize * cellSize;
  const words = new Uint32Array(4);
  const flight = new Uint32Array(4);
  let drawn = -1;
  /** where each piece came down, and the word that says on which site */
  const landed: number[] = [];
  const within = (i: number, n: number) =>
    i >= 0 && i < n ? i : boundary === 'mirror' ? mirrored(i, n) : undefined;

  for (let cell = 0; cell < cover.length; cell++) {
    if (cover[cell] === 0) continue;
    if (cell >>> 2 !== drawn) {
      drawn = cell >>> 2;
      philox4x32(words, drawn, index, replicate, processes.fragments, luck.k0, luck.k1);
    }
    const pieces = poissonQuantile(uniform(words[cell & 3]), piecesOfFullCell * cover[cell]);
    for (let piece = 0; piece < pieces; piece++) {
      philox4x32(flight, cell, index, replicate, processes.flights + (piece << 8), luck.k0, luck.k1);
      const towards = direction(uniform(flight[0]));
      const cells = (-log(uniform(flight[1])) * fragmentDistance) / cellSize;
      const startX = (cell % width) + ((flight[2] & 0xffff) + 0.5) / 65_536;
      const startY = Math.floor(cell / width) + ((flight[2] >>> 16) + 0.5) / 65_536;
      const x = within(Math.floor(startX + cells * towards.x), width);
      const y = within(Math.floor(startY + cells * towards.y), height);
      if (x !== undefined && y !== undefined) landed.push(y * width + x, flight[3]);
    }
  }

  // Only now: what has just taken root breaks no pieces in the same step.
  let rooted = 0;
  for (let i = 0; i < landed.length; i += 2) {
    const cell = landed[i];
    const N = sites[capacity[cell]];
    const n = clumps[cell];
    if (uniform(landed[i + 1]) * N < n || n === N) continue;
    setClumps(map, cell, n + 1);
    rooted++;
  }
  if (rooted > 0) kernel.changed();
  return rooted;
}
