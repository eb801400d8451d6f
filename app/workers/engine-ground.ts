import { buildGround, sourceBytes, type RasterValues } from '#sim-core/grid/build-ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
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

/** @throws RunProblem at each layer whose numbers do not become shares */
export function engineGround(
  sources: LayerSources,
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): EngineGround {
  const { cover: surveyed, ...ground } = buildGround(sources, grid, rasterOf);
  const { capacity, vigour, exposure, refuge, fence } = ground;
  const cover = new Uint8Array(surveyed.length);
  const sums = { capacity: 0, vigour: 0, exposure: 0 };
  let [shelter, barren, barrenShelter] = [0, 0, 0];
  let [plantable, sheltered, fenced, covered, stranded, overfull] = [0, 0, 0, 0, 0, 0];
  for (let i = 0; i < cover.length; i++) {
    const k = capacity[i] / 255;
    const held = Math.min(surveyed[i], k);
    cover[i] = Math.round(held * 255);
    covered += held;
    if (refuge[i] > 0) {
      if (k > 0) {
        sheltered++;
        shelter += refuge[i] / 255;
      } else {
        barren++;
        barrenShelter += refuge[i] / 255;
      }
    }
    if (fence[i] > 0) fenced++;
    if (surveyed[i] > 0 && k === 0) stranded++;
    // A survey in whole per cent may stand half a step above a capacity held in 8 bits.
    else if (surveyed[i] > k + 1 / 255) overfull++;
    if (k === 0) continue;
    plantable++;
    sums.capacity += k;
    sums.vigour += vigour[i] / 255;
    sums.exposure += exposure[i] / 255;
  }
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
    withoutElevation: withoutElevation(sources.capacity, grid, rasterOf),
  };
  return { ...ground, cover, facts };
}

/** Of a capacity that is a product of class and elevation: cells that only the missing elevation bars. */
function withoutElevation(
  capacity: LayerSources['capacity'],
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): number {
  if (typeof capacity !== 'object' || !('product' in capacity)) return 0;
  const [ofClass, ofElevation] = capacity.product;
  if (typeof ofElevation !== 'object' || !('layer' in ofElevation)) return 0;
  const { values, noData } = rasterOf(ofElevation);
  const classes = sourceBytes(ofClass, grid, rasterOf);
  let missing = 0;
  for (let i = 0; i < classes.length; i++)
    if (classes[i] > 0 && (Number.isNaN(values[i]) || values[i] === noData)) missing++;
  return missing;
}
