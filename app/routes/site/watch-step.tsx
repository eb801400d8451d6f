import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '#app/components/link-button.tsx';
import { comparisonsQuery } from '#app/features/comparisons/get-comparison.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { useSite } from './use-site.ts';

/**
 * The next step of those who may change nothing here, trainers above all: to watch the newest finished run from its
 * survey on, or to open the newest comparison.
 */
export function WatchStep(props: {
  /** which of the two matters on this page */
  first: 'run' | 'comparison';
  /** only runs of this option */
  optionId?: string;
}) {
  const { first, optionId } = props;
  const { site } = useSite();
  const runs = useQuery(runsQuery(site.id)).data?.runs;
  const comparisons = useQuery(comparisonsQuery(site.id)).data?.comparisons;
  if (!runs || !comparisons) return null;
  const run = runs.find(
    (each) => each.status === 'finished' && (optionId === undefined || each.optionId === optionId),
  );
  const comparison = comparisons.find(({ done }) => done > 0);
  const steps = [
    run && {
      of: 'run',
      to: `/sites/${site.id}/runs/${run.id}?year=${run.surveyYear}`,
      words: `Watch ${run.name}`,
    },
    comparison && {
      of: 'comparison',
      to: `/sites/${site.id}/compare/${comparison.id}`,
      words: `Open ${comparison.name}`,
    },
  ].filter((step) => step !== undefined);
  if (steps.length === 0)
    return (
      <p className="text-note text-ink-2">
        Nothing to watch yet: it is there as soon as a modeller or manager of the team has run something.
      </p>
    );
  return steps
    .sort((a, b) => Number(b.of === first) - Number(a.of === first))
    .map(({ to, words }, i) => (
      <LinkButton key={to} kind={i === 0 ? 'primary' : 'quiet'} to={to}>
        {words}
      </LinkButton>
    ));
}
