import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import { coverOfClumps, type KernelSetup } from '#sim-core/kernel/kernel.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import type { Mode } from '#sim-core/spec/run-spec.ts';
import { stream } from '#sim-core/random/streams.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';

export interface BenchCase {
  readonly mode: Mode;
  /** `full`: every cell lives; `sparse`: 1 % do, in patches */
  readonly map: 'full' | 'sparse';
  /** cells on a side */
  readonly size: number;
  readonly steps: number;
  readonly rounds: number;
  readonly droughtIndex: number;
  readonly setup: KernelSetup;
}

const cellSize = 1;
/** Larger maps are this one laid side by side, so that a cell is the same work at every size. */
const tile = 500;

/** A map of the given kind, drawn from a seed of its own, under default rates. */
export function benchCase(mode: Mode, map: 'full' | 'sparse', size: number): BenchCase {
  const random = stream(`bench ${map}`, 'parameters');
  const byte = (low: number, high: number) =>
    Uint8Array.from({ length: tile * tile }, () => low + Math.floor((high - low + 1) * random.quick()));
  const capacity = byte(180, 255);
  const alive = map === 'full' ? new Uint8Array(tile * tile).fill(1) : patches(tile, random);
  const sites = clumpSites(defaultRates.clumpsPerSquareMetre, cellSize);
  const clumps = Uint32Array.from(capacity, (k, i) =>
    alive[i] ? Math.ceil(sites[k] * (0.5 + 0.5 * random.quick())) : 0,
  );
  const cover = Float32Array.from(capacity, (k, i) => coverOfClumps(k, clumps[i], sites[k]));
  const laid = <T extends Uint8Array | Uint32Array | Float32Array>(from: T, to: T): T => {
    for (let y = 0; y < size; y++)
      for (let x = 0; x < size; x += tile) {
        const row = (y % tile) * tile;
        to.set(from.subarray(row, row + Math.min(tile, size - x)), y * size + x);
      }
    return to;
  };
  const cells = size * size;
  const counts = mode === 'counts';
  return {
    mode,
    map,
    size,
    // One, so that a sparse map is one: what lives is heard of ever farther.
    steps: 1,
    rounds: size > 2000 ? 3 : size > 500 ? 10 : 200,
    droughtIndex: -1,
    setup: {
      width: size,
      height: size,
      mode,
      boundary: 'mirror',
      taps: fitKernel(defaultRates, cellSize, 1).taps,
      step: stepRates(defaultRates, 1),
      rates: defaultRates,
      capacity: laid(capacity, new Uint8Array(cells)),
      vigour: laid(byte(200, 255), new Uint8Array(cells)),
      exposure: laid(byte(0, 60), new Uint8Array(cells)),
      refuge: laid(byte(0, 40), new Uint8Array(cells)),
      cover: counts ? undefined : laid(cover, new Float32Array(cells)),
      clumps: counts ? laid(clumps, new Uint32Array(cells)) : undefined,
      sites,
      luck: { k0: 1, k1: 2 },
      replicate: 0,
    },
  };
}

/** Discs of radius 5 until 1 % of the cells live. */
function patches(size: number, random: () => number): Uint8Array {
  const alive = new Uint8Array(size * size);
  let living = 0;
  while (living < 0.01 * size * size) {
    const x0 = 5 + Math.floor(random() * (size - 10));
    const y0 = 5 + Math.floor(random() * (size - 10));
    for (let y = -5; y <= 5; y++)
      for (let x = -5; x <= 5; x++) {
        const at = (y0 + y) * size + x0 + x;
        if (x * x + y * y > 25 || alive[at]) continue;
        alive[at] = 1;
        living++;
      }
  }
  return alive;
}
