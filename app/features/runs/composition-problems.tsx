import type { Site } from '#contract/sites.ts';
import { WordLink } from '#app/components/word-button.tsx';
import type { CompositionProblem, MendingPlace } from './compose-run-spec.ts';

const places: Record<Exclude<MendingPlace, 'form'>, string> = {
  ground: 'Mend it on Ground',
  plant: 'Mend it on Plant',
  outlook: 'Mend it on Outlook',
  options: 'Mend it on Options',
};

/** What stands in the way of a run, each with the page that mends it. */
export function CompositionProblems(props: {
  problems: readonly CompositionProblem[];
  nameProblem?: string | undefined;
  site: Site;
  optionId: string;
}) {
  const { problems, nameProblem, site } = props;
  if (problems.length === 0 && nameProblem === undefined) return null;
  return (
    <ul role="alert" className="mt-3 border-l-[6px] border-danger">
      {nameProblem !== undefined && <li className="py-1 pl-3.5 text-[13.5px]">{nameProblem}</li>}
      {problems.slice(0, 8).map(({ field, message, mend }) => (
        <li
          key={field}
          className="flex flex-wrap items-baseline gap-x-4 border-t border-rule-2 py-1 pl-3.5 text-[13.5px] first:border-0"
        >
          <span>{message}</span>
          {mend !== 'form' && (
            <WordLink
              to={`/sites/${site.id}/${mend}${mend === 'options' ? `?option=${props.optionId}` : ''}`}
            >
              {places[mend]}
            </WordLink>
          )}
        </li>
      ))}
      {problems.length > 8 && (
        <li className="py-1 pl-3.5 text-note text-ink-2">and {problems.length - 8} more</li>
      )}
    </ul>
  );
}
