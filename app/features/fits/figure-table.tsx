import { Table } from '#app/components/table.tsx';
import type { LeftOutYear } from '#sim-core/fit/leave-one-out.ts';
import { figureLabel, figureValue } from './fit-words.ts';
import type { FigureFit } from './posterior-figures.ts';

const range = ({ figure, low, high }: Pick<FigureFit, 'figure' | 'low' | 'high'>) =>
  `${figureValue(figure, low)} to ${figureValue(figure, high)}`;

/** What was surveyed, what the beliefs before foresaw, and what the fitted rates come to. */
export function FigureTable({
  fitted,
  prior,
}: {
  fitted: readonly FigureFit[];
  prior: readonly FigureFit[];
}) {
  return (
    <Table
      caption="What was surveyed, and the middle nine tenths of what runs came to before and after the fit"
      rows={fitted.map((row, i) => ({ ...row, before: prior.at(i) }))}
      rowKey={({ figure }) => figureLabel(figure)}
      columns={[
        { key: 'what', head: 'survey', cell: ({ figure }) => figureLabel(figure) },
        {
          key: 'observed',
          head: 'surveyed',
          number: true,
          cell: ({ figure }) => figureValue(figure, figure.observed),
        },
        {
          key: 'before',
          head: 'foreseen before',
          number: true,
          wide: true,
          cell: ({ before }) => (before ? range(before) : '–'),
        },
        { key: 'after', head: 'after', number: true, cell: range },
        {
          key: 'within',
          head: 'holds it',
          cell: ({ figure, low, high }) => (figure.observed >= low && figure.observed <= high ? 'yes' : 'no'),
        },
      ]}
    />
  );
}

/** What a fit to all other years foresaw of each year. */
export function LeftOutTable({ years }: { years: readonly LeftOutYear[] }) {
  const rows = years.flatMap(({ figures }) => figures);
  const held = rows.filter(({ within }) => within).length;
  return (
    <>
      <p className="mb-1.5 max-w-[62ch]">
        {held} of {rows.length} figures lie within what the other years alone foresaw. Rates that explain
        years they were not fitted to are worth more than a close fit.
      </p>
      <Table
        caption="Each year foreseen by a fit to all other years"
        rows={rows}
        rowKey={({ figure }) => figureLabel(figure)}
        columns={[
          { key: 'what', head: 'left out', cell: ({ figure }) => figureLabel(figure) },
          {
            key: 'observed',
            head: 'surveyed',
            number: true,
            cell: ({ figure }) => figureValue(figure, figure.observed),
          },
          { key: 'foreseen', head: 'foreseen', number: true, cell: range },
          { key: 'within', head: 'within', cell: ({ within }) => (within ? 'yes' : 'no') },
        ]}
      />
    </>
  );
}
