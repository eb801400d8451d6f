/** The public face of the engine. */
export { createRun, type Run, type RunInput, type YearOutcome } from './run/create-run.ts';
export { RunProblem } from './run/run-problem.ts';
export { engineVersion } from './run/engine-version.ts';
export { frameDigest, toFrame } from './run/frame.ts';
export { fitKernel, frontSpeed, type FittedKernel, type SpreadRates } from './theory/fit-kernel.ts';
export { referenceShare } from './theory/reference-cover.ts';
export { stepRates, type StepRates } from './theory/step-rates.ts';
export { cannotClose, stillOpen } from './measure/closing.ts';
export { buildGround, type RasterValues } from './grid/build-ground.ts';
export type { RunResult, SeriesRow } from './spec/run-result.ts';
export { prepareWorks } from './process/works.ts';
