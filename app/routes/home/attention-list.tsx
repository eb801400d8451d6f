import { LinkButton } from '#app/components/link-button.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import type { Role } from '#contract/people.ts';
import type { ComparisonSummary } from '#contract/comparisons.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { SiteSummary } from '#contract/sites.ts';
import { nextStep } from './next-step.ts';

interface Item {
  key: string;
  name: string;
  words: string;
  to: string;
  action: string;
  /** only somebody with another role can bring it on */
  others?: boolean;
}

/** What waits for this person: runs that have not finished, then what each site needs next from their role. */
export function AttentionList(props: {
  sites: readonly { site: SiteSummary; role: Role }[];
  unfinished: readonly { site: SiteSummary; run: RunSummary }[];
  /** comparisons that are done and not decided */
  undecided: readonly { site: SiteSummary; role: Role; comparison: ComparisonSummary }[];
}) {
  const items: Item[] = [
    ...props.unfinished.map(({ site, run }) => ({
      key: run.id,
      name: `${run.name}, ${site.name}`,
      words: `started ${formatDateTime(run.startedAt)} by ${run.startedBy}; ${run.frames} of ${run.years + 1} years kept so far`,
      to: `/sites/${site.id}/runs/${run.id}`,
      action: 'Open the run',
    })),
    ...props.undecided.map(({ site, role, comparison }) => {
      const decides = role === 'manager' || role === 'admin';
      return {
        key: comparison.id,
        name: `${comparison.name}, ${site.name}`,
        words: `${comparison.done} futures of each of ${comparison.options.length} options${decides ? ', waits for your decision' : ''}`,
        to: `/sites/${site.id}/compare/${comparison.id}`,
        others: !decides,
        action: decides ? 'Compare and decide' : 'Open the comparison',
      };
    }),
    ...props.sites.flatMap(({ site, role }) => {
      const next = nextStep(site);
      return next?.roles.includes(role) ? [{ key: site.id, name: site.name, ...next }] : [];
    }),
  ];
  const mine = items.filter(({ others }) => !others);
  return (
    <>
      <Items title="Waits for you" items={mine} />
      <Items
        title="Waits for a manager"
        items={items.filter(({ others }) => others)}
        first={mine.length === 0}
      />
    </>
  );
}

/** @param first the first of them is the page's main step */
function Items({ title, items, first = true }: { title: string; items: readonly Item[]; first?: boolean }) {
  if (items.length === 0) return null;
  return (
    <Section title={title}>
      <ul>
        {items.map((item, i) => (
          <li
            key={item.key}
            className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 border-t border-rule-2 py-2 first:border-t-0"
          >
            <p className="min-w-0">
              <b>{item.name}</b> <span className="text-ink-2">{item.words}</span>
            </p>
            {first && i === 0 ? (
              <LinkButton kind="primary" to={item.to}>
                {item.action}
              </LinkButton>
            ) : (
              <WordLink to={item.to}>{item.action}</WordLink>
            )}
          </li>
        ))}
      </ul>
    </Section>
  );
}
