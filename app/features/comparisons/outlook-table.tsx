import { Table } from '#app/components/table.tsx';
import { of100 } from '#sim-core/compare/chance-words.ts';
import { nearChance, type ComparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import { listed } from '#sim-core/compare/summary-words.ts';
import { OptionName } from './chosen.tsx';

/** Chances to close in time by outlook, what each option may be regretted by, and which is never far from the best. */
export function OutlookTable(props: { figures: ComparisonFigures; chosen: number | undefined }) {
  const { outlooks, regret } = props.figures;
  if (!regret) return null;
  const options = outlooks[0].options;
  const rows = options.map((option, i) => ({ option, i, ...regret.rows[i] }));
  const never = rows.filter((row) => row.neverFar).map((row) => `“${row.option.name}”`);
  const least = listed(regret.leastRegret.map((i) => `“${options[i].name}”`));
  return (
    <section aria-label="Across outlooks">
      <div className="flex flex-wrap justify-between gap-x-4 pb-1">
        <b>Across outlooks</b>
        <span className="text-note text-ink-2">futures of 100 that close in time</span>
      </div>
      <Table
        caption="Futures of 100 that close before the next drought, by option and outlook, with what is lost against the best option of each outlook"
        rows={rows}
        rowKey={({ i }) => String(i)}
        columns={[
          {
            key: 'option',
            head: 'option',
            cell: ({ option, i }) => <OptionName name={option.name} chosen={i === props.chosen} />,
          },
          ...outlooks.map((outlook, o) => ({
            key: `o${o}`,
            head: outlook.name,
            number: true,
            cell: ({ i, regrets }: (typeof rows)[number]) => (
              <>
                {of100(outlook.options[i].summary.beforeDrought.share?.estimate ?? 0)}
                {regrets[o] > 0 && <span className="text-note text-ink-2"> (−{of100(regrets[o])})</span>}
              </>
            ),
          })),
          { key: 'worst', head: 'worst', number: true, cell: ({ worstValue }) => of100(worstValue) },
          { key: 'regret', head: 'most regret', number: true, cell: ({ worstRegret }) => of100(worstRegret) },
        ]}
      />
      <p className="mt-1.5 text-note text-ink-2">
        {never.length > 0
          ? `${listed(never)} ${never.length > 1 ? 'are' : 'is'} never more than ${of100(nearChance)} of 100 from the best.`
          : `No option is within ${of100(nearChance)} of 100 of the best under every outlook.`}{' '}
        The most that can be regretted is least with {least}.
      </p>
    </section>
  );
}
