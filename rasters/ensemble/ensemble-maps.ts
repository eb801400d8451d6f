import { strFromU8, strToU8, unzipSync, zipSync, type Zippable } from 'fflate';
import { z } from 'zod';
import { decodeCellValues, encodeCellValues } from '#rasters/cells/cell-values.ts';
import { closingMaps } from '#sim-core/ensemble/closing-maps.ts';
import { byteSums } from './byte-sums.ts';

/** The maps of one ensemble, as replicates stream in: memory follows the map and the kept years, not their number. */
export interface EnsembleMaps {
  /**
   * Takes in a replicate, once: a second time changes nothing.
   * @param frames cover of the kept years, round(255·C)
   */
  add(replicate: number, closing: Int16Array, frames: ReadonlyMap<number, Uint8Array>): void;
  /** replicates that are in, ascending */
  replicates(): number[];
  /**
   * A map by its name: `closing`, the median closing year (Int16; 0 more than half open, −32768 cannot hold the plant);
   * `chance-<year>`, the chance of having closed by then, and `cover-<year>`, the mean cover (both round(255 × share)).
   */
  map(name: string): Uint8Array | Int16Array;
  /** all that `createEnsembleMaps` needs to go on */
  state(): Uint8Array;
}

export interface MapsInput {
  readonly width: number;
  readonly height: number;
  /** kept years, ascending */
  readonly years: readonly number[];
}

const stateSchema = z.object({
  format: z.literal('foothold-ensemble-maps'),
  version: z.union([z.literal(1), z.literal(2)]),
  width: z.number().int(),
  height: z.number().int(),
  years: z.array(z.number().int()),
  replicates: z.array(z.number().int()),
});

/**
 * @param from a state to go on from
 * @throws Error where the state is damaged, or of another map
 */
export function createEnsembleMaps({ width, height, years }: MapsInput, from?: Uint8Array): EnsembleMaps {
  const cells = width * height;
  const held = from && readState(from, { width, height, years });
  const taken = new Set(held?.replicates);
  const closing = closingMaps(cells, years, held?.counts);
  /** Σ round(255 · C) of each kept year: whole numbers, so the order of replicates changes nothing */
  const sums = years.map((_, y) => byteSums(cells, held?.sums[y]));
  const mean = (year: number) => {
    const sum = sums[years.indexOf(year)].values();
    const means = new Uint8Array(cells);
    for (let i = 0; i < cells; i++) means[i] = Math.round(sum[i] / taken.size);
    return means;
  };
  const chance = (year: number) => {
    const shares = closing.chanceBy(year);
    const bytes = new Uint8Array(cells);
    // NaN, where the plant cannot be held, becomes 0.
    for (let i = 0; i < cells; i++) bytes[i] = Math.round(255 * shares[i]);
    return bytes;
  };

  return {
    add(replicate, closingYears, frames) {
      if (taken.has(replicate)) return;
      const missing = years.find((year) => !frames.has(year));
      if (missing !== undefined) throw new Error(`The cover of ${missing} was not kept.`);
      closing.add(closingYears);
      years.forEach((year, y) => sums[y].add(frames.get(year)!));
      taken.add(replicate);
    },
    replicates: () => [...taken].sort((a, b) => a - b),
    map(name) {
      if (name === 'closing') return closing.medianYear();
      const [kind, year] = name.split('-');
      if (!years.includes(Number(year))) throw new Error(`No map of ${year} is kept.`);
      return kind === 'chance' ? chance(Number(year)) : mean(Number(year));
    },
    state() {
      const { canClose, planes } = closing.counts();
      const packed = (values: Uint8Array | Uint16Array | Uint32Array) =>
        encodeCellValues({ width, height, values }, 'quick');
      const files: Zippable = {
        'state.json': strToU8(
          JSON.stringify({
            format: 'foothold-ensemble-maps',
            version: 2,
            width,
            height,
            years: [...years],
            replicates: [...taken],
          } satisfies z.infer<typeof stateSchema>),
        ),
        'can-close': packed(canClose),
      };
      years.forEach((year, y) => {
        const plane = planes[y];
        if (plane) files[`closed-${year}`] = packed(plane);
        files[`cover-${year}`] = packed(sums[y].values());
      });
      // What is in it is packed already.
      return zipSync(files, { level: 0 });
    },
  };
}

function readState(bytes: Uint8Array, { width, height, years }: MapsInput) {
  const files = unzipSync(bytes);
  const state = stateSchema.parse(JSON.parse(strFromU8(files['state.json'])));
  if (state.width !== width || state.height !== height || state.years.join() !== years.join())
    throw new Error(
      `The stored counts are of ${state.width} × ${state.height} cells and the years ${state.years.join(', ')}; expected ${width} × ${height} and ${years.join(', ')}.`,
    );
  const unpack = <T>(name: string, ...types: (abstract new (...args: never[]) => T)[]): T => {
    const { values } = decodeCellValues(files[name], { cells: width * height });
    const type = types.find((each) => values instanceof each);
    if (!type) throw new Error(`The stored counts hold other numbers in ${name}.`);
    return values as T;
  };
  const planes = years.map((year) => {
    const name = `closed-${year}`;
    if (!(name in files)) return undefined;
    return state.replicates.length < 256 ? unpack(name, Uint8Array) : unpack(name, Uint16Array);
  });
  return {
    replicates: state.replicates,
    counts: { count: state.replicates.length, canClose: unpack('can-close', Uint8Array), planes },
    // Of 32 bits throughout in version 1.
    sums: years.map((year) => unpack<Uint16Array | Uint32Array>(`cover-${year}`, Uint16Array, Uint32Array)),
  };
}

/** The maps of an ensemble that are stored when it stands still. */
export const mapNames = (years: readonly number[]): string[] => [
  'closing',
  ...years.flatMap((year) => [`chance-${year}`, `cover-${year}`]),
];
