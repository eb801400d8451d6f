import type { Fit } from '#contract/fits.ts';
import type { Runner } from '#sim-core/ensemble/runner.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { checkProposals, fitMap, type CheckedYear } from '#sim-core/fit/fit-check.ts';
import { runOfProposal } from '#sim-core/fit/fit-run.ts';
import type { FitTarget } from '#sim-core/fit/fit-target.ts';
import {
  agreementMeasures,
  agreementOf,
  changeAgreement,
  unknown,
  type Agreement,
  type ChangeAgreement,
} from '#sim-core/fit/map-agreement.ts';
import { abcPlanOf } from './abc-plan.ts';

/** Futures that look at what a fit came to. */
export const checkRuns = 24;

/** A measure over the runs of a check: its median and middle nine tenths; undefined where no run told it. */
export type Spread = readonly [low: number, middle: number, high: number] | undefined;

/** How a resurvey and the runs of the fitted rates fall together. */
export interface CheckedMap {
  readonly year: number;
  /** as `fitMap` tells cells, row-major */
  readonly cells: Uint8Array;
  /** of the map that at least half of the runs agree on */
  readonly agreement: Agreement;
  /** of what changed since the survey that runs start from, in that map */
  readonly change: ChangeAgreement;
  /** over single runs */
  readonly kappa: Spread;
  readonly kappaOfPlace: Spread;
  readonly kappaOfAmount: Spread;
  readonly amountDisagreement: Spread;
  readonly placeDisagreement: Spread;
  readonly criticalSuccess: Spread;
  /** m, above 0 where the simulated edge lies outside the surveyed one */
  readonly edge: Spread;
  /** m, whatever the side */
  readonly edgeSize: Spread;
}

const spreadOf = (values: readonly (number | undefined)[]): Spread => {
  const told = values.filter((value) => value !== undefined);
  return told.length === 0 ? undefined : (quantiles(told, [0.05, 0.5, 0.95]) as [number, number, number]);
};

/**
 * Runs the fitted rates and holds each resurvey against them. The same fit always comes to the same check.
 *
 * @param pool on the fit's ground; the caller closes it
 * @throws RunsCancelled when the signal is aborted
 */
export async function runCheck(
  fit: Pick<Fit, 'plan' | 'state'>,
  target: FitTarget,
  pool: Runner,
  { signal, onProgress }: { signal: AbortSignal; onProgress: (done: number, of: number) => void },
): Promise<CheckedMap[]> {
  const { plan, state } = fit;
  const proposals = checkProposals(abcPlanOf(plan), state, checkRuns);
  const stood = target.maps.map(({ cells }) => new Uint8Array(cells.length));
  const byYear: CheckedYear[][] = target.maps.map(() => []);
  const job = pool.start(
    proposals.map((proposal) => runOfProposal(plan.base, plan.rates, proposal)),
    {
      onResult: ({ checked }) => {
        checked!.forEach((year, m) => {
          byYear[m].push({ ...year, stands: new Uint8Array() });
          year.stands.forEach((stands, i) => (stood[m][i] += stands));
        });
      },
      onFailure: (error) => {
        throw error;
      },
      onProgress: ({ runsDone, runs }) => onProgress(runsDone, runs),
    },
    { keep: { closing: false, fit: { target, want: 'check' } } },
  );
  const stop = () => job.cancel();
  signal.addEventListener('abort', stop, { once: true });
  try {
    await job.finished;
  } finally {
    signal.removeEventListener('abort', stop);
  }
  return target.maps.map((map, m) => checkedMap(target, map, stood[m], byYear[m]));
}

function checkedMap(
  { fromStart }: FitTarget,
  { year, cells }: FitTarget['maps'][number],
  stood: Uint8Array,
  years: readonly CheckedYear[],
): CheckedMap {
  const simulated = stood.map((count) => (2 * count >= years.length ? 1 : 0));
  const before = cells.map((value, i) => (value === unknown ? unknown : fromStart[i] === 0 ? 1 : 0));
  const measures = years.map(({ agreement }) => agreementMeasures(agreement));
  return {
    year,
    cells: fitMap(cells, stood, years.length),
    agreement: agreementOf(cells, simulated),
    change: changeAgreement(before, cells, simulated),
    kappa: spreadOf(measures.map(({ kappa }) => kappa)),
    kappaOfPlace: spreadOf(measures.map(({ kappaOfPlace }) => kappaOfPlace)),
    kappaOfAmount: spreadOf(measures.map(({ kappaOfAmount }) => kappaOfAmount)),
    amountDisagreement: spreadOf(measures.map(({ amountDisagreement }) => amountDisagreement)),
    placeDisagreement: spreadOf(measures.map(({ placeDisagreement }) => placeDisagreement)),
    criticalSuccess: spreadOf(measures.map(({ criticalSuccess }) => criticalSuccess)),
    edge: spreadOf(years.map(({ edge }) => edge?.mean)),
    edgeSize: spreadOf(years.map(({ edge }) => edge?.meanSize)),
  };
}
