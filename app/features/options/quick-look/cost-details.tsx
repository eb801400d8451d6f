import type { Costs } from '#sim-core/plan/costs.ts';
import { costPerHectare } from '#sim-core/plan/costs.ts';
import { formatArea } from '#app/lib/formats.ts';
import { Table } from '#app/components/table.tsx';
import { formatMoney } from '#contract/format-money.ts';

/** m² below which a cost per hectare would say nothing. */
const leastArea = 100;

/** What the works cost by year, and for each hectare that they bring back. */
export function CostDetails(props: {
  costs: Costs;
  /** m² closed by the horizon with the works and without; undefined while not known */
  closed: { works: number; wait: number } | undefined;
  lastYear: number;
}) {
  const { costs, closed, lastYear } = props;
  const money = (amount: number) => formatMoney(amount, costs.currency);
  const years = costs.byYear.filter((year) => year.total > 0);
  const each = closed && costPerHectare(costs.total, closed.works, closed.wait);
  return (
    <section aria-label="Costs" className="mt-4 border-t border-rule pt-2">
      <h2 className="text-body font-bold">Costs</h2>
      <p className="mt-0.5 text-note text-ink-2">
        {costs.presentValue !== costs.total && `Worth ${money(costs.presentValue)} in today’s money. `}
        {each !== undefined && closed && closed.works - closed.wait < leastArea
          ? `By ${lastYear} hardly more ground closes than under Wait: too little to price by the hectare.`
          : each !== undefined && closed
            ? `${money(each)} for each hectare that closes by ${lastYear} and would still be open then under Wait (${formatArea(closed.works - closed.wait)}, by growth alone). Ground that Wait closes too, only later, is not counted.`
            : closed && costs.total > 0
              ? `By ${lastYear} no more ground closes than under Wait, so there is no cost per hectare.`
              : ''}
      </p>
      {years.length > 0 && (
        <details className="mt-1 text-note">
          <summary className="w-max border-b border-rule">Costs by year</summary>
          <Table
            caption={`Costs by year, ${costs.currency}`}
            className="mt-1"
            columns={[
              { key: 'year', head: 'year', cell: (row) => row.year },
              {
                key: 'works',
                head: 'works',
                number: true,
                cell: (row) => money(row.mounds + row.clumps + row.fences),
              },
              {
                key: 'rest',
                head: 'visits, fixed',
                number: true,
                cell: (row) => money(row.visits + row.fixed),
              },
              { key: 'total', head: 'in all', number: true, cell: (row) => money(row.total) },
            ]}
            rows={years}
            rowKey={(row) => String(row.year)}
          />
        </details>
      )}
    </section>
  );
}
