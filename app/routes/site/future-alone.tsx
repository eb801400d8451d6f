import { useMutation, useQueries, useQuery, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { drawnWords } from '#contract/belief-words.ts';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { registerRunMutation } from '#app/features/runs/change-run.ts';
import { runQuery } from '#app/features/runs/get-run.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { runManager } from '#app/features/runs/live-runs.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { runSpecSchema, type RunSpec } from '#sim-core/spec/run-spec.ts';
import { useStartParts } from './run-ground.ts';
import { useSite } from './use-site.ts';

/** Parsed, so that two specs which say the same read the same. */
const inOneOrder = (spec: RunSpec) => JSON.stringify(runSpecSchema.parse(spec));

/**
 * One future of a comparison as a run of its own: started from here, or, where the site has a run of the very same spec,
 * a link to it and whether it came to the digest that the comparison holds.
 */
export function FutureAlone(props: {
  comparison: Comparison;
  option: number;
  outlook: number;
  record: ReplicateRecord;
}) {
  const { comparison, option, outlook, record } = props;
  const { plan, siteId } = comparison;
  const { mayDraw } = useSite();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const partsOf = useStartParts();
  const register = useMutation(registerRunMutation(queryClient, siteId));
  const { optionId, name } = plan.options[option];
  const listed = useQuery(runsQuery(siteId, { limit: 100 })).data?.runs ?? [];
  const alike = listed.filter((run) => run.optionId === optionId && run.seed === plan.common.seed);
  const runs = useQueries({ queries: alike.map(({ id }) => runQuery(id)) });
  const spec = replicateSpec(plan, option, outlook, record.replicate);
  const wanted = inOneOrder(spec);
  const run = runs.map(({ data }) => data).find((data) => data && inOneOrder(data.spec) === wanted);
  const drew = drawnWords(record.drawn);
  const draws = drew && `It drew ${drew}. `;
  if (run)
    return (
      <>
        {draws}
        <WordLink to={`/sites/${siteId}/runs/${run.id}`}>Run alone</WordLink>
        {run.digest === null
          ? ' (not at its end)'
          : run.digest === record.digest
            ? ', it came to the digest of this future.'
            : ', it came to another digest than this future: another engine computed one of them.'}
      </>
    );
  if (!mayDraw || runs.some(({ isPending }) => isPending)) return draws || null;
  const start = () =>
    register.mutate(
      {
        name: `${name}, future ${record.replicate + 1} of “${comparison.name}”`.slice(0, 120),
        optionId,
        spec,
      },
      {
        onSuccess: (started) => {
          runManager.start(partsOf(started));
          void navigate(`/sites/${siteId}/runs/${started.id}`);
        },
      },
    );
  return (
    <>
      {draws}
      <WordButton lined onClick={start}>
        Run it alone and watch
      </WordButton>
      {register.error ? <ProblemNotice error={register.error} title="The future was not started." /> : null}
    </>
  );
}
