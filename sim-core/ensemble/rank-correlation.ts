/** Rank of each value, from 1; equal values share the mean of their ranks. */
export function ranks(values: ArrayLike<number>): Float64Array {
  const order = Uint32Array.from({ length: values.length }, (_, i) => i).sort(
    (a, b) => values[a] - values[b],
  );
  const found = new Float64Array(values.length);
  for (let from = 0, to: number; from < order.length; from = to) {
    to = from + 1;
    while (to < order.length && values[order[to]] === values[order[from]]) to++;
    for (let k = from; k < to; k++) found[order[k]] = (from + to + 1) / 2;
  }
  return found;
}

/**
 * Rank correlation (Spearman 1904, American Journal of Psychology 15:72–101): how nearly one rises with the other, −1..1.
 * NaN where one of them never changes.
 *
 * @throws RangeError where the two differ in length, or a value is no number
 */
export function rankCorrelation(x: ArrayLike<number>, y: ArrayLike<number>): number {
  if (x.length !== y.length)
    throw new RangeError(
      `Found ${x.length} and ${y.length} values; a correlation needs as many of one as of the other`,
    );
  for (let i = 0; i < x.length; i++)
    if (Number.isNaN(x[i]) || Number.isNaN(y[i])) throw new RangeError(`Pair ${i} holds no number`);
  const a = ranks(x);
  const b = ranks(y);
  const middle = (x.length + 1) / 2;
  let both = 0;
  let ofA = 0;
  let ofB = 0;
  for (let i = 0; i < a.length; i++) {
    both += (a[i] - middle) * (b[i] - middle);
    ofA += (a[i] - middle) ** 2;
    ofB += (b[i] - middle) ** 2;
  }
  return both / Math.sqrt(ofA * ofB);
}
