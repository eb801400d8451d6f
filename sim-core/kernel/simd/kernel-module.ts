import { kernelBytes } from './kernel-bytes.ts';

interface Address {
  readonly value: number;
}

/** What the compiled kernel offers (`assembly/index.ts`); addresses are known once the memory is laid out. */
export interface KernelExports {
  readonly memory: { readonly buffer: ArrayBuffer };
  layOut(
    width: number,
    height: number,
    radius: number,
    mirror: boolean,
    counts: boolean,
    wide: boolean,
  ): number;
  setSpread(carryOver: number, recruits: number, seedlings: number, growth: number, crowding: number): void;
  setLoss(
    years: number,
    background: number,
    drought: number,
    lossWidth: number,
    tolerance: number,
    exposureShift: number,
    refugeShift: number,
    neighbourShift: number,
  ): void;
  setLuck(key0: number, key1: number, replicate: number): void;
  /** takes part 0 to 3 (K, g, E, M) of row y from `groundRow` */
  layGround(part: number, y: number): void;
  refugeAt(cell: number): number;
  setRefuge(cell: number, value: number): void;
  setSkip(skip: boolean): void;
  look(): void;
  /** after `layOut`, where there are grazers */
  layOutGrazers(radius: number): number;
  setGrazers(eats: number, masses: number, refugeLoss: number, comeIn: number, most: number): void;
  step(index: number, droughtIndex: number, grazerDecline: number): void;
  binomialQuantile(u: number, n: number, p: number): number;
  drawPair(word: number, n: number, N: number, chance: number): number;
  philox(out: number, counter: number, step: number, replicate: number, key0: number, key1: number): void;
  readonly cover: Address;
  readonly clumps: Address;
  readonly groundRow: Address;
  readonly grazers: Address;
  readonly fence: Address;
  readonly taps: Address;
  readonly grazerTaps: Address;
  readonly sites: Address;
  readonly words: Address;
  readonly lostToDrought: { readonly value: number };
  readonly lostToBackground: { readonly value: number };
  readonly lostToGrazing: { readonly value: number };
}

let compiled: WebAssembly.Module | undefined;

/** A fresh kernel with a memory of its own. */
export function instantiateKernel(): KernelExports {
  compiled ??= new WebAssembly.Module(Uint8Array.from(atob(kernelBytes), (c) => c.charCodeAt(0)));
  return new WebAssembly.Instance(compiled).exports as KernelExports;
}
