/** The public face of the engine. */
export { createRun, type Run, type RunInput, type YearOutcome } from './run/create-run.ts';
export { RunProblem } from './run/run-problem.ts';
export { engineVersion } from './run/engine-version.ts';
export { frameDigest, toFrame } from './run/frame.ts';
export { fitKernel, frontSpeed, type FittedKernel, type SpreadRates } from './theory/fit-kernel.ts';
export { referenceShare } from './theory/reference-cover.ts';
export { stepRates, type StepRates } from './theory/step-rates.ts';
export { cannotClose, closingBandName, stillOpen } from './measure/closing.ts';
export { buildGround, type RasterValues } from './grid/build-ground.ts';
export type { RunResult, SeriesRow } from './spec/run-result.ts';
export { fillTime } from './theory/fill-time.ts';
export { drawWeather, type WeatherOfRun } from './weather/draw-weather.ts';
export type { WaitingLaw, WeatherSource } from './spec/weather-source.ts';
export { palmerClass, palmerClasses } from './weather/palmer-classes.ts';
export { chanceOfLonger, meanWait } from './weather/waiting-law.ts';
export {
  ensembleTally,
  type EnsembleInput,
  type EnsembleSummary,
  type EnsembleTally,
} from './ensemble/ensemble-tally.ts';
export { kaplanMeier, medianTime, restrictedMean, type CurvePoint } from './ensemble/kaplan-meier.ts';
export { wilsonInterval, type Interval } from './ensemble/proportion.ts';
export { quantiles } from './ensemble/quantile.ts';
export { coverFan, fanShares, type CoverFan } from './ensemble/cover-fan.ts';
export { closingMaps, type ClosingCounts, type ClosingMaps } from './ensemble/closing-maps.ts';
export { recordReplicate } from './ensemble/replicate-record.ts';
export { nextDroughtYear, type BeforeDrought } from './ensemble/next-drought.ts';
export { beliefQuantile, centralValue, cutShare } from './belief/belief-quantile.ts';
export { ratesOfRun, uncertainNames, withRates, type RatesOfRun } from './belief/rates-of-run.ts';
export type { Belief, BeliefLaw } from './spec/belief.ts';
export type { Beliefs, DrawnRates, Uncertain } from './spec/uncertain.ts';
export { latinHypercube } from './ensemble/latin-hypercube.ts';
export { rankCorrelation } from './ensemble/rank-correlation.ts';
export {
  morrisScreening,
  morrisTrajectories,
  type FactorEffect,
  type Trajectory,
} from './ensemble/morris.ts';
export {
  sobolDesign,
  sobolIndices,
  type SobolDesign,
  type SobolIndices,
  type SobolOutputs,
} from './ensemble/sobol.ts';
export { pairedDifference, type PairedDifference } from './compare/paired-difference.ts';
export { bestShares, type BestShare } from './compare/best-option.ts';
export { efficiency, efficientLine, type CostAndGain } from './compare/efficient-options.ts';
export { regretTable, type RegretTable } from './compare/regret.ts';
export { weighOptions, type Criterion, type Weighting } from './compare/weighting.ts';
export { levelOfLooks, sureEnough, type Standing, type StopRule } from './compare/stop-rule.ts';
