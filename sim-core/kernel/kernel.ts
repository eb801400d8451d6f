import type { Grazing } from '#sim-core/process/grazers.ts';
import type { PhiloxKey } from '#sim-core/random/streams.ts';
import type { Rates } from '#sim-core/spec/parameters.ts';
import type { Boundary, Mode } from '#sim-core/spec/run-spec.ts';
import type { StepRates } from '#sim-core/theory/step-rates.ts';

/** The rates of loss and shelter that a step reads. */
export type LossRates = Pick<
  Rates,
  | 'backgroundLoss'
  | 'droughtLoss'
  | 'lossWidth'
  | 'tolerance'
  | 'exposureShift'
  | 'refugeShift'
  | 'neighbourShift'
  | 'refugeGrowth'
  | 'crowding'
>;

/** All that a kernel needs; arrays of cells are row-major, width × height, shares k/255. */
export interface KernelSetup {
  readonly width: number;
  readonly height: number;
  readonly mode: Mode;
  readonly boundary: Boundary;
  /** weights of 0, 1 … radius cells; the whole sums to 1 */
  readonly taps: Float64Array;
  readonly step: StepRates;
  readonly rates: LossRates;
  readonly capacity: Uint8Array;
  readonly vigour: Uint8Array;
  readonly exposure: Uint8Array;
  readonly refuge: Uint8Array;
  /** mean-field: share covered, at most the capacity */
  readonly cover?: Float32Array;
  /** counts: clumps that stand in each cell, at most its sites */
  readonly clumps?: Uint32Array;
  /** counts: clump sites N of a cell, by capacity byte; 256 values */
  readonly sites: Uint32Array;
  readonly luck: PhiloxKey;
  readonly replicate: number;
  /** absent: there are none */
  readonly grazing?: Grazing;
  /** leave out what is bare and hears nothing (default); the results are the same without */
  readonly skip?: boolean;
}

/**
 * ΣC that a step lost, in cells, by cause: what is lost in a cell is split in proportion to the hazards of the causes, so
 * that they add up to it. In counts mode what is to be expected of the state before the step.
 */
export interface StepLosses {
  drought: number;
  background: number;
  grazing: number;
}

/**
 * The step of the model on one map. The arrays are live views of the kernel's own state: actions write to them between
 * steps, and in counts mode whoever changes `clumps` changes `cover` too (`coverOfClumps`). Whoever changed them calls
 * `changed` before the next step.
 */
export interface Kernel {
  readonly cover: Float32Array;
  readonly clumps: Uint16Array | Uint32Array | undefined;
  /** where there are grazers: how many, 1/m², and F, k/255 */
  readonly grazers: Float32Array | undefined;
  readonly fence: Uint8Array | undefined;
  /** M of a cell, k/255 */
  refugeAt(cell: number): number;
  setRefuge(cell: number, refuge: number): void;
  /** Says that others wrote to the arrays, so that the kernel looks anew at where anything lives. */
  changed(): void;
  /**
   * Neighbourhood, recruitment, loss, next state; then grazers, who hear the plants of the start of the step.
   *
   * @param index step from the survey on, 0 first: part of the counter of every draw
   * @param droughtIndex X of this step
   */
  step(index: number, droughtIndex: number): StepLosses;
}

export type CreateKernel = (setup: KernelSetup) => Kernel;

/** C of n clumps on N sites of a cell of capacity k/255: K n/N, in 32 bits like all cover. */
export const coverOfClumps = (capacityByte: number, clumps: number, sites: number): number =>
  sites === 0 ? 0 : Math.fround((capacityByte / 255) * (clumps / sites));
