import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { Fit } from '#contract/fits.ts';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { AgreementTable } from '#app/features/fits/agreement-table.tsx';
import { checkRuns, runCheck, type CheckedMap } from '#app/features/fits/run-check.ts';
import { fetchLayers } from '#app/features/layers/engine-ground.ts';
import type { MapClass, MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { createReplicatePool } from '#app/workers/replicate-pool.ts';
import { bareInBoth, falseAlarm, hit, missed } from '#sim-core/fit/fit-check.ts';
import { unknown } from '#sim-core/fit/map-agreement.ts';
import { runOfProposal } from '#sim-core/fit/fit-run.ts';
import { originOfFit, targetOfFit } from './fit-ground.ts';

/** Dark to light in this order, so that they are told apart without their hue. */
const classes: readonly MapClass[] = [
  { value: hit, name: 'standing in both', colour: '#2f5d3a' },
  { value: missed, name: 'survey alone', colour: '#b5331f' },
  { value: falseAlarm, name: 'runs alone', colour: '#f0c04c' },
  { value: bareInBoth, name: 'bare in both', colour: '#c9c4b2' },
  { value: unknown, name: 'not compared', colour: '#9fb0b8' },
];

/** Runs of the fitted rates against each resurvey: a map of hits and misses, κ and its parts, edges. */
export function FitCheck({ fit }: { fit: Fit }) {
  const queryClient = useQueryClient();
  const [progress, setProgress] = useState({ done: 0, of: checkRuns });
  const abort = useRef<AbortController>(undefined);
  const [year, setYear] = useState<number>();
  useEffect(() => () => abort.current?.abort(), []);
  const check = useMutation({
    mutationFn: async (): Promise<CheckedMap[]> => {
      abort.current = new AbortController();
      const { signal } = abort.current;
      const { plan, grid } = fit;
      const target = await targetOfFit(queryClient, fit);
      const ground = await fetchLayers(originOfFit(fit), Object.values(plan.base.layers), signal);
      const point = plan.rates.map(() => 0.5);
      const spec = runOfProposal(plan.base, plan.rates, { generation: 0, number: 0, point });
      const pool = createReplicatePool({ spec, grid, ground });
      try {
        return await runCheck(fit, target, pool, {
          signal,
          onProgress: (done, of) => setProgress({ done, of }),
        });
      } finally {
        pool.close();
      }
    },
  });
  const shown = check.data?.find((map) => map.year === year) ?? check.data?.at(-1);
  const cancelled = check.error instanceof Error && check.error.name === 'RunsCancelled';
  return (
    <section aria-label="Map by map" className="grid gap-2 border-t border-ink pt-3">
      <h2 className="text-lead">Map by map</h2>
      {!shown && (
        <>
          <p className="max-w-[68ch]">
            {checkRuns} futures with rates drawn from the fit, held against each resurvey cell by cell.
          </p>
          {check.isPending ? (
            <div className="max-w-[560px]">
              <Progress label={`future ${progress.done} of ${progress.of}`} {...progress} />
              <WordButton lined onClick={() => abort.current?.abort()}>
                Cancel
              </WordButton>
            </div>
          ) : (
            <div>
              <Button onClick={() => check.mutate()}>Compare map by map</Button>
            </div>
          )}
          {check.error && !cancelled && <ProblemNotice error={check.error} title="Not compared." />}
        </>
      )}
      {shown && check.data && (
        <>
          {check.data.length > 1 && (
            <WordChoice
              label="Resurvey of"
              showLabel
              options={check.data.map((map) => ({ key: String(map.year), label: String(map.year) }))}
              value={String(shown.year)}
              onChange={(key) => setYear(Number(key))}
            />
          )}
          <div className="grid gap-x-8 gap-y-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
            <FitMap fit={fit} checked={shown} />
            <div className="min-w-0">
              <AgreementTable checked={shown} cellArea={fit.grid.cellSize ** 2} />
            </div>
          </div>
        </>
      )}
    </section>
  );
}

function FitMap({ fit, checked }: { fit: Fit; checked: CheckedMap }) {
  const raster = useMemo(
    (): MapRaster => ({ kind: 'classes', values: checked.cells, classes }),
    [checked.cells],
  );
  return (
    <div className="relative h-[46dvh] min-h-[300px] border border-ink">
      <SiteMap
        className="size-full"
        grid={fit.grid}
        raster={raster}
        label={`Resurvey of ${checked.year} against the fitted runs`}
        summary={`Where plants stand in the resurvey of ${checked.year} and in at least half of ${checkRuns} fitted futures. The table beside it gives the areas.`}
      />
    </div>
  );
}
