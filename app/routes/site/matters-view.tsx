import { useSearchParams } from 'react-router-dom';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { EmptyState } from '#app/components/empty-state.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { QuestionLine } from '#app/features/matters/question-line.tsx';
import { readSettings } from '#app/features/matters/study-settings.ts';
import { useSearchPatch } from '#app/lib/use-search-patch.ts';
import { beliefsThatApply } from '#sim-core/spec/uncertain.ts';
import { MattersLook } from './matters-look.tsx';
import { MattersStudy } from './matters-study.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** The question, what the futures made tell of it, and a study of its own. */
export function MattersView({ comparison }: { comparison: Comparison }) {
  const { site } = useSite();
  const { plan, id, name } = comparison;
  const [search] = useSearchParams();
  const patch = useSearchPatch();
  const settings = readSettings(search, plan);
  const base = replicateSpec(plan, settings.option, settings.outlook, 0);
  const drawn = base.uncertain?.rates;
  // A comparison of fixed rates is studied with what is believed now.
  const rates = drawn ?? beliefsThatApply({ draws: 1, rates: site.plant.beliefs }, base.processes)?.rates;
  return (
    <SitePage step="compare" title={`What matters, ${name}`}>
      <div className="border-b border-ink pb-2">
        <WordLink to={`/sites/${site.id}/compare/${id}`} plain>
          {name}
        </WordLink>
        <h1 className="text-title font-bold">What matters</h1>
      </div>
      <div className="py-3">
        <QuestionLine {...{ plan, settings }} onChange={patch} />
      </div>
      {rates === undefined ? (
        <EmptyState title="Every rate is known exactly.">
          Nothing can be varied. Say on <WordLink to={`/sites/${site.id}/plant`}>Plant</WordLink> what is
          believed of the rates that are not known, then come back.
        </EmptyState>
      ) : (
        <>
          <MattersLook {...{ comparison, settings, drawn }} />
          <MattersStudy {...{ comparison, settings, rates }} asDrawn={drawn !== undefined} onChange={patch} />
          <p className="max-w-[72ch] border-t border-rule pt-3 text-note text-ink-2">
            Rates are varied independently, within what is believed of them: a belief that is too narrow makes
            a rate seem to matter less than it does. A simulation supports a decision; it is no permit, survey
            or engineering design.
          </p>
        </>
      )}
    </SitePage>
  );
}
