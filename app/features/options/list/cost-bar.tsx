import { formatMoney } from '#contract/format-money.ts';
import type { OptionCost } from './option-costs.ts';

/** What an option costs, in words and as a bar on the scale that all share, with the budget as a line across it. */
export function CostBar({ cost, scale }: { cost: OptionCost; scale: number }) {
  const { total, budget, currency } = cost;
  const money = (amount: number) => formatMoney(amount, currency);
  const over = budget !== null && total > budget;
  const x = (amount: number) => (amount / scale) * 97;
  return (
    <span className="block text-note leading-snug">
      <svg
        viewBox="0 0 100 7"
        preserveAspectRatio="none"
        aria-hidden="true"
        className="mt-1 block h-2 w-full"
      >
        <path d="M0 6.500H100" vectorEffect="non-scaling-stroke" className="stroke-rule" />
        <rect y={2} width={x(total)} height={4.5} className="fill-ink" />
        {budget !== null && (
          <path
            d={`M${x(budget)} 0V7`}
            strokeWidth={2}
            vectorEffect="non-scaling-stroke"
            className="stroke-danger"
          />
        )}
      </svg>
      <span className="tabular-nums">{money(total)}</span>
      {over && <span className="font-semibold text-danger">, {money(total - budget)} over</span>}
    </span>
  );
}
