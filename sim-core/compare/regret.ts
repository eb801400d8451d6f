/** How an option stands across outlooks, if it were chosen before the outlook is known. */
export interface RegretRow {
  /** what is lost against the best option of each outlook */
  readonly regrets: number[];
  readonly worstRegret: number;
  /** its value in the outlook that is worst for it */
  readonly worstValue: number;
  /** whether in no outlook it is further from the best than `near` */
  readonly neverFar: boolean;
}

export interface RegretTable {
  readonly rows: RegretRow[];
  /** options with the least worst regret (Savage 1951, JASA 46:55–67); more than one where they tie */
  readonly leastRegret: number[];
  /** options with the best worst value (Wald 1945, Ann. Math. 46:265–280) */
  readonly bestWorst: number[];
}

/**
 * @param values by option, by outlook: more is better, e.g. the chance to close in time
 * @param near how far from the best still counts as near, in the values' unit
 * @throws RangeError of no option, no outlook, or unlike lengths
 */
export function regretTable(values: readonly (readonly number[])[], near: number): RegretTable {
  const outlooks = values[0]?.length ?? 0;
  if (outlooks === 0 || values.some((row) => row.length !== outlooks))
    throw new RangeError(
      'Every option needs a value under every outlook, and at least one of each is needed',
    );
  const best = values[0].map((_, outlook) => Math.max(...values.map((row) => row[outlook])));
  const rows = values.map((row) => {
    const regrets = row.map((value, outlook) => best[outlook] - value);
    const worstRegret = Math.max(...regrets);
    return { regrets, worstRegret, worstValue: Math.min(...row), neverFar: worstRegret <= near };
  });
  const atBest = (of: (row: RegretRow) => number, good: number) =>
    rows.flatMap((row, option) => (of(row) === good ? [option] : []));
  return {
    rows,
    leastRegret: atBest((row) => row.worstRegret, Math.min(...rows.map((row) => row.worstRegret))),
    bestWorst: atBest((row) => row.worstValue, Math.max(...rows.map((row) => row.worstValue))),
  };
}
