/** Round numbers between `from` and `to`, about as many as wanted. */
export function niceTicks(from: number, to: number, wanted: number): number[] {
  const rough = (to - from) / wanted;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((n) => n * power).find((size) => size >= rough) ?? power * 10;
  const ticks: number[] = [];
  for (let n = Math.ceil(from / step); n * step <= to; n++) ticks.push(Number((n * step).toPrecision(12)));
  return ticks;
}

/**
 * Puts labels into as few rows as keep them apart.
 * @param labels ascending in `at`, where each belongs, with its length
 * @param width of a row; a label that would leave it stands to the left of its place
 */
export function stagger(
  labels: readonly { at: number; length: number }[],
  width: number,
): { from: number; row: number }[] {
  const ends: number[] = [];
  return labels.map(({ at, length }) => {
    const from = Math.max(0, at + 3 + length > width ? at - length : at + 3);
    let row = ends.findIndex((end) => end <= from);
    if (row < 0) row = ends.length;
    ends[row] = from + length;
    return { from, row };
  });
}
