import { formatMoney } from '#contract/format-money.ts';
import { niceStep } from '#app/map/map-ticks.ts';

const width = 308;
const base = 24;

/** The cost of an option as a bar along a graduated rule, with the budget as a line across it. */
export function BudgetRule(props: { total: number; budget: number | null; currency: string }) {
  const { total, budget, currency } = props;
  const money = (amount: number) => formatMoney(amount, currency);
  const step = niceStep(Math.max(total, budget ?? 0, 1) / 4);
  const end = Math.ceil((Math.max(total, budget ?? 0, 1) * 1.02) / step) * step;
  const x = (amount: number) => (amount / end) * width;
  const over = budget !== null && total > budget;
  const marks = Math.round(end / step) * 5;
  return (
    <>
      <p className="flex flex-wrap justify-between gap-x-3 text-note">
        <b className="font-bold">{money(total)} in all</b>
        {budget !== null && (
          <span className={over ? 'font-semibold text-danger' : 'text-ink-2'}>
            {over
              ? `${money(total - budget)} over the budget of ${money(budget)}`
              : `${money(budget - total)} left of ${money(budget)}`}
          </span>
        )}
      </p>
      <svg
        viewBox={`0 0 ${width} 42`}
        aria-hidden="true"
        className="block w-full overflow-visible font-mono text-axis"
      >
        {Array.from({ length: marks + 1 }, (_, i) => (
          <path
            key={i}
            d={`M${(i / marks) * width} ${i % 5 === 0 ? 14 : 19}V${base}`}
            className="stroke-ink"
            strokeOpacity={0.75}
          />
        ))}
        <rect x={0} y={base - 7} width={x(total)} height={7} className="fill-ink" />
        <path d={`M0 ${base}H${width}`} className="stroke-ink" />
        {budget !== null && <path d={`M${x(budget)} 8V31`} strokeWidth={2.5} className="stroke-ink" />}
        <text x={0} y={39} className="fill-ink">
          0
        </text>
        <text x={width} y={39} textAnchor="end" className="fill-ink">
          {money(end)}
        </text>
      </svg>
    </>
  );
}
