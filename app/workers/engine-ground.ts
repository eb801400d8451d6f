import { shareReader, type RasterValues, type ShareReader } from '#sim-core/grid/source-shares.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { groundLayers, ShareError, type GroundLayer } from '#sim-core/grid/ground.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { LayerSources, RasterSource } from '#sim-core/spec/run-spec.ts';

/** The ground as a run would start from it, one byte a cell: round(255 × share). */
export interface EngineGround {
  readonly capacity: Uint8Array;
  readonly vigour: Uint8Array;
  readonly exposure: Uint8Array;
  readonly refuge: Uint8Array;
  readonly fence: Uint8Array;
  /** what stands at the survey, none of it above capacity */
  readonly cover: Uint8Array;
  readonly facts: GroundFacts;
}

/** What the maps say in numbers; areas are counted in cells. Means are over the cells that can hold the plant. */
export interface GroundFacts {
  readonly plantable: number;
  readonly meanCapacity: number;
  readonly meanVigour: number;
  readonly meanExposure: number;
  /** cells with surveyed refuge that can hold the plant, and the sum of its strength in them */
  readonly sheltered: number;
  readonly shelter: number;
  /** cells with surveyed refuge on ground that cannot hold the plant, where it does nothing, and the sum of its strength */
  readonly barren: number;
  readonly barrenShelter: number;
  readonly fenced: number;
  /** sum of the shares that stand */
  readonly covered: number;
  /** cells with cover surveyed on ground that cannot hold the plant; the run starts without it */
  readonly stranded: number;
  /** cells with cover surveyed above the capacity of their ground; the run starts at capacity */
  readonly overfull: number;
  /** cells whose class can hold the plant and whose elevation is missing */
  readonly withoutElevation: number;
}

/** Cells that are put together in one go. */
const stretch = 262_144;

/**
 * The ground as `buildGround` makes it, byte for byte, with its facts in the same pass. It goes stretch by stretch over
 * all layers at once, so that it needs no array of numbers beside the bytes, can say how far it is, and can be left.
 *
 * @param between called after each stretch with the cells done; what it throws ends the work
 * @throws RunProblem at each layer whose numbers do not become shares
 */
export async function engineGround(
  sources: LayerSources,
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
  between: (done: number, cells: number) => void | Promise<void> = () => undefined,
): Promise<EngineGround> {
  const cells = grid.width * grid.height;
  const problems = new Map<GroundLayer, FieldProblem>();
  const guarded = <T>(layer: GroundLayer, work: () => T): T | undefined => {
    if (problems.has(layer)) return undefined;
    try {
      return work();
    } catch (error) {
      if (!(error instanceof ShareError)) throw error;
      problems.set(layer, { field: `layers.${layer}`, message: error.message });
      return undefined;
    }
  };
  const parts = groundLayers.map((layer) => ({
    layer,
    read: guarded(layer, () => shareReader(sources[layer], grid, rasterOf)),
    bytes: new Uint8Array(cells),
  }));
  const [capacity, vigour, exposure, refuge, fence, cover] = parts.map(({ bytes }) => bytes);
  const missing = elevationGaps(sources.capacity, grid, rasterOf);
  const shares = new Float32Array(Math.min(stretch, cells));
  const sums = { capacity: 0, vigour: 0, exposure: 0 };
  let [shelter, barren, barrenShelter] = [0, 0, 0];
  let [plantable, sheltered, fenced, covered, stranded, overfull, withoutElevation] = [0, 0, 0, 0, 0, 0, 0];

  for (let first = 0; first < cells; first += stretch) {
    const some = shares.subarray(0, Math.min(stretch, cells - first));
    for (const { layer, read, bytes } of parts)
      guarded(layer, () => {
        read?.(first, some);
        // What stands is held back by capacity below; everything else is rounded as it is.
        if (layer !== 'cover')
          for (let i = 0; i < some.length; i++) bytes[first + i] = Math.round(some[i] * 255);
      });
    if (problems.size === 0) {
      // Cover was read last, so `some` holds it.
      for (let i = 0; i < some.length; i++) {
        const cell = first + i;
        const k = capacity[cell] / 255;
        const held = Math.min(some[i], k);
        cover[cell] = Math.round(held * 255);
        covered += held;
        if (refuge[cell] > 0) {
          if (k > 0) {
            sheltered++;
            shelter += refuge[cell] / 255;
          } else {
            barren++;
            barrenShelter += refuge[cell] / 255;
          }
        }
        if (fence[cell] > 0) fenced++;
        if (some[i] > 0 && k === 0) stranded++;
        // A survey in whole per cent may stand half a step above a capacity held in 8 bits.
        else if (some[i] > k + 1 / 255) overfull++;
        if (k === 0) continue;
        plantable++;
        sums.capacity += k;
        sums.vigour += vigour[cell] / 255;
        sums.exposure += exposure[cell] / 255;
      }
      withoutElevation += missing?.(first, some) ?? 0;
    }
    await between(first + some.length, cells);
  }
  if (problems.size > 0) throw new RunProblem([...problems.values()]);
  const mean = (sum: number) => (plantable === 0 ? 0 : sum / plantable);
  const facts: GroundFacts = {
    plantable,
    meanCapacity: mean(sums.capacity),
    meanVigour: mean(sums.vigour),
    meanExposure: mean(sums.exposure),
    sheltered,
    shelter,
    barren,
    barrenShelter,
    fenced,
    covered,
    stranded,
    overfull,
    withoutElevation,
  };
  return { capacity, vigour, exposure, refuge, fence, cover, facts };
}

/** Of a capacity that is a product of class and elevation: counts the cells of a stretch that only the missing elevation bars. */
function elevationGaps(
  capacity: LayerSources['capacity'],
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): ((first: number, scratch: Float32Array) => number) | undefined {
  if (typeof capacity !== 'object' || !('product' in capacity)) return undefined;
  const [ofClass, ofElevation] = capacity.product;
  if (typeof ofElevation !== 'object' || !('layer' in ofElevation)) return undefined;
  const { values, noData } = rasterOf(ofElevation);
  const readClass: ShareReader = shareReader(ofClass, grid, rasterOf);
  return (first, scratch) => {
    readClass(first, scratch);
    let gaps = 0;
    for (let i = 0; i < scratch.length; i++) {
      const height = values[first + i];
      if (Math.round(scratch[i] * 255) > 0 && (Number.isNaN(height) || height === noData)) gaps++;
    }
    return gaps;
  };
}
