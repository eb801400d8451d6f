import type { Block } from '#contract/blocks.ts';
import { formatNumber } from '#contract/formats.ts';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import { allParameters, anyRateNames, processOf } from '#sim-core/spec/all-parameters.ts';
import type { Belief } from '#sim-core/spec/belief.ts';

/** The rates of a comparison with their units and where they come from; those that each future draws with their law. */
export function rateTable({ rates, processes, uncertain }: ComparisonPlan['common']): Block {
  const values: Partial<Record<string, number>> = { ...rates, ...processes.grazers, ...processes.fragments };
  const named = anyRateNames.filter((name) => {
    const part = processOf(name);
    return part === undefined || processes[part] !== undefined;
  });
  return {
    kind: 'table',
    caption: 'Rates',
    head: ['Rate', 'Sign', 'Value', 'Unit', 'Where it comes from'],
    rows: named.map((name) => {
      const { label, symbol, unit, default: usual, source } = allParameters[name];
      const belief = uncertain?.rates[name];
      const value = values[name];
      return [
        label,
        symbol,
        belief ? 'drawn' : value === undefined ? '–' : formatNumber(value, 4),
        unit,
        belief
          ? `drawn by each future: ${beliefInWords(belief)}`
          : value === usual
            ? `the program’s default: ${source}`
            : 'set by the team',
      ];
    }),
    numbers: [2],
    signs: [],
  };
}

function beliefInWords(belief: Belief): string {
  const say = (value: number) => formatNumber(value, 4);
  switch (belief.law) {
    case 'uniform':
      return `anything from ${say(belief.low)} to ${say(belief.high)} alike`;
    case 'triangular':
      return `${say(belief.low)} to ${say(belief.high)}, likeliest ${say(belief.mode)} (triangular)`;
    case 'normal':
      return `${say(belief.mean)} ± ${say(belief.standardDeviation)} (normal)`;
    case 'log-normal':
      return `${say(belief.median)} times or over ${say(belief.factor)} (log-normal)`;
    case 'beta':
      return `${say(belief.low)} to ${say(belief.high)} (beta, ${say(belief.alpha)} and ${say(belief.beta)})`;
    case 'values':
      return `from ${belief.values.length} measured or fitted values`;
  }
}
