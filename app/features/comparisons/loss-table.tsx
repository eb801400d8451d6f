import { Table } from '#app/components/table.tsx';
import { formatArea } from '#app/lib/formats.ts';
import type { LossCause, OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { OptionName } from './chosen.tsx';

const causes: Record<LossCause, string> = {
  drought: 'to drought',
  background: 'background',
  grazing: 'to grazing',
  events: 'to events',
};

/** What was lost in an average future, by cause, and how often what had recovered was lost again. */
export function LossTable(props: { figures: OutlookFigures; chosen: number | undefined }) {
  const { options, replicates } = props.figures;
  const told = (Object.keys(causes) as LossCause[]).filter((cause) =>
    options.some(({ lost }) => lost[cause] > 0),
  );
  return (
    <section aria-label="Losses">
      <div className="flex flex-wrap justify-between gap-x-4 pb-1">
        <b>Losses</b>
        <span className="text-note text-ink-2">summed over all years of an average future</span>
      </div>
      <Table
        caption="Covered area lost over all years of an average future, by cause, and futures in which what had recovered was lost again"
        rows={options}
        rowKey={({ name }) => name}
        columns={[
          {
            key: 'option',
            head: 'option',
            cell: (option) => (
              <OptionName name={option.name} chosen={options[props.chosen ?? -1] === option} />
            ),
          },
          ...told.map((cause) => ({
            key: cause,
            head: causes[cause],
            number: true,
            cell: ({ lost }: (typeof options)[number]) => formatArea(lost[cause]),
          })),
          {
            key: 'again',
            head: 'lost again',
            number: true,
            cell: ({ lostAgain }) => `${lostAgain} of ${replicates}`,
          },
        ]}
      />
      <p className="mt-1.5 text-note text-ink-2">
        Options with more marsh can lose more of it: a larger loss than under Wait need not mean that works do
        harm.
      </p>
    </section>
  );
}
