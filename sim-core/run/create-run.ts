import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { groundLayers, type Ground } from '#sim-core/grid/ground.ts';
import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import type { CreateKernel, StepLosses } from '#sim-core/kernel/kernel.ts';
import { createSimdKernel } from '#sim-core/kernel/simd/simd-kernel.ts';
import { closingYears, referenceSum } from '#sim-core/measure/closing.ts';
import { measureCover } from '#sim-core/measure/cover-measures.ts';
import { recoveredYear } from '#sim-core/measure/recovery.ts';
import { scatterFragments, type FragmentMap } from '#sim-core/process/fragments.ts';
import { datedLosses } from '#sim-core/process/expected-losses.ts';
import { grazerTaps } from '#sim-core/process/grazers.ts';
import { prepareWorks } from '#sim-core/process/works.ts';
import { philoxKey } from '#sim-core/random/streams.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { RunResult, SeriesRow } from '#sim-core/spec/run-result.ts';
import { frameYears, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { fitKernel } from '#sim-core/theory/fit-kernel.ts';
import { referenceShares } from '#sim-core/theory/reference-cover.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { drawWeather } from '#sim-core/weather/draw-weather.ts';
import { engineVersion } from './engine-version.ts';
import { frameDigest, toFrame } from './frame.ts';
import { RunProblem } from './run-problem.ts';
import { surveyedClumps, surveyedCover } from './survey.ts';

/** The state at the end of a year. */
export interface YearOutcome {
  readonly year: number;
  /** one row a step; of the survey, one */
  readonly rows: SeriesRow[];
  /** round(255·C), row-major, of years that are reported; a fresh array that may be transferred */
  readonly frame: Uint8Array | undefined;
}

/** A run that advances a year at a time. */
export interface Run {
  readonly survey: YearOutcome;
  /**
   * The next year, or undefined after the last.
   *
   * @param onStep told after each step how many of all the run's steps are done
   */
  nextYear(onStep?: (done: number, of: number) => void): YearOutcome | undefined;
  /** C of the latest year as the kernel holds it, Float32, row-major; a fresh array */
  cover(): Float32Array;
  /** closing year of every cell so far: 0 still open, −32768 cannot hold the plant; Int16, a fresh array */
  closing(): Int16Array;
  /** @throws Error before the last year */
  result(): RunResult;
}

export interface RunInput {
  /** its `layers` are not read here: they are the ground */
  readonly spec: RunSpec;
  readonly grid: Grid;
  /** not changed, and must not change while the run lasts */
  readonly ground: Ground;
}

/**
 * A run: a pure function of its specification and ground.
 *
 * @param createKernel the one that ships; the reference kernel in tests
 * @throws RunProblem naming each field that makes the run impossible
 */
export function createRun(
  { spec, grid, ground }: RunInput,
  createKernel: CreateKernel = createSimdKernel,
): Run {
  refuseOtherSizes(grid, ground);
  const { width, height, cellSize } = grid;
  const { capacity, vigour, exposure, refuge, fence } = ground;
  const { seed, replicate, mode, boundary, surveyYear, stepsPerYear } = spec;
  const { rates, processes } = ratesOfRun(spec);
  const works = prepareWorks(spec.actions, grid, capacity, datedLosses(spec));
  if (works.problems.length > 0) throw new RunProblem(works.problems);
  const { grazers, fragments } = processes;
  const fitted = fitKernel(rates, cellSize, stepsPerYear);
  const step = stepRates(rates, stepsPerYear);
  const counts = mode === 'counts';
  const sites = counts ? clumpSites(rates.clumpsPerSquareMetre, cellSize) : new Uint32Array(256);
  const kernel = createKernel({
    width,
    height,
    mode,
    boundary,
    taps: fitted.taps,
    step,
    rates,
    capacity,
    vigour,
    exposure,
    refuge,
    sites,
    cover: counts ? undefined : surveyedCover(ground),
    clumps: counts ? surveyedClumps(ground, sites, seed) : undefined,
    luck: philoxKey(seed, `shoots/${replicate}`),
    replicate,
    grazing: grazers && { rates: grazers, taps: grazerTaps(grazers, cellSize, stepsPerYear), fence },
  });

  const cellArea = cellSize * cellSize;
  const worksMap = {
    kernel,
    capacity,
    fence,
    sites,
    clumpsOnFullCell: rates.clumpsPerSquareMetre * cellArea,
    luck: philoxKey(seed, `events/${replicate}`),
    replicate,
  };
  const fragmentMap: FragmentMap = {
    ...{ kernel, capacity, sites, replicate, width, height, cellSize, boundary },
    years: step.years,
    luck: philoxKey(seed, `fragments/${replicate}`),
  };

  const references = referenceShares(step);
  const reference = referenceSum(capacity, vigour, references);
  const closing = closingYears(capacity, vigour, references);
  const drought = drawWeather(spec);
  const reported = new Set(frameYears(spec));
  const digest = frameDigest();
  const series: SeriesRow[] = [];
  let finished: RunResult | undefined;
  let stepsDone = 0;
  let year = surveyYear;

  function record(droughtIndex: number | null, lost: StepLosses & { events: number }): SeriesRow {
    const measured = measureCover(kernel.cover, width, height);
    const closingNow = closing.update(kernel.cover, year);
    const row: SeriesRow = {
      time: surveyYear + stepsDone / stepsPerYear,
      droughtIndex,
      coveredArea: measured.cover * cellArea,
      recoveredShare: reference > 0 ? measured.cover / reference : 0,
      occupiedArea: measured.occupied * cellArea,
      closedArea: closing.closed() * cellArea,
      closingArea: droughtIndex === null ? 0 : closingNow * cellArea,
      edgeLength: measured.edges * cellSize,
      patches: measured.patches,
      largestPatchArea: measured.largestPatch * cellArea,
      lostToDrought: lost.drought * cellArea,
      lostToBackground: lost.background * cellArea,
      lostToGrazing: lost.grazing * cellArea,
      lostToEvents: lost.events * cellArea,
    };
    series.push(row);
    return row;
  }

  function outcome(rows: SeriesRow[]): YearOutcome {
    const frame = reported.has(year) ? toFrame(kernel.cover) : undefined;
    if (frame) digest.add(frame);
    return { year, rows, frame };
  }

  const survey = outcome([record(null, { drought: 0, background: 0, grazing: 0, events: 0 })]);

  return {
    survey,
    nextYear(onStep) {
      if (stepsDone === drought.length) return undefined;
      year++;
      const rows: SeriesRow[] = [];
      for (let s = 0; s < stepsPerYear; s++) {
        const events = s === 0 ? works.apply(year, stepsDone, worksMap) : 0;
        const index = stepsDone++;
        const losses = kernel.step(index, drought[index]);
        if (fragments) scatterFragments(fragments, index, fragmentMap);
        rows.push(record(drought[index], { ...losses, events }));
        onStep?.(stepsDone, drought.length);
      }
      return outcome(rows);
    },
    cover: () => kernel.cover.slice(),
    closing: () => closing.years.slice(),
    result() {
      if (stepsDone < drought.length)
        throw new Error(`The run stands at ${year}; its result is known after ${surveyYear + spec.years}.`);
      return (finished ??= {
        series,
        referenceArea: reference * cellArea,
        recoveredYear: recoveredYear(series, spec.target),
        digest: digest.value(),
        engineVersion,
        kernel: {
          variance: fitted.variance,
          radius: fitted.radius,
          frontSpeed: fitted.frontSpeed,
          diagonalFrontSpeed: fitted.diagonalFrontSpeed,
        },
        warnings: [...fitted.warnings, ...warnings(spec, reference)],
      });
    },
  };
}

function refuseOtherSizes({ width, height }: Grid, ground: Ground): void {
  const cells = width * height;
  const problems: FieldProblem[] = groundLayers
    .filter((layer) => ground[layer].length !== cells)
    .map((layer) => ({
      field: `layers.${layer}`,
      message: `Found ${ground[layer].length} cells; expected ${width} × ${height} = ${cells}`,
    }));
  if (problems.length === 0 && ground.capacity.every((k) => k === 0))
    problems.push({
      field: 'layers.capacity',
      message: 'No cell can hold the plant: give at least one class or value a capacity above 0',
    });
  if (problems.length > 0) throw new RunProblem(problems);
}

function warnings(spec: RunSpec, reference: number): string[] {
  const said: string[] = [];
  if (reference === 0)
    said.push('Nothing grows from little on this ground at these rates, so there is no cover to recover to.');
  const { grazers, fragments } = spec.processes;
  if (!grazers && spec.actions.some((action) => action.kind === 'fence'))
    said.push('Fences keep grazers out; this run has no grazers, so they change nothing.');
  if (fragments && spec.mode === 'mean-field')
    said.push('Fragments are single pieces: they are left out in mean-field mode. Use mode counts.');
  return said;
}
