/**
 * e^(−t) I_n(t) for n = 0 … highest, with I_n the modified Bessel function of the first kind; Float64, `highest` + 1
 * values. By Miller's backward recurrence I_(n−1) = I_(n+1) + (2n/t) I_n, made to obey I_0 + 2 Σ I_n = e^t
 * (Abramowitz & Stegun 1964, 9.6.26, 9.6.37 and 9.12): only +, ×, ÷, so the same bits on every machine.
 *
 * @param t above 0 and finite
 */
export function scaledBesselI(t: number, highest: number): Float64Array {
  const values = new Float64Array(highest + 1);
  // I_n falls off like e^(−n²/2t): this far out nothing is left that a double could see.
  const start = Math.max(highest, Math.ceil(15 * Math.sqrt(t))) + 20;
  let above = 0;
  let here = 1e-290;
  let sum = 0;
  for (let n = start; n > 0; n--) {
    if (n <= highest) values[n] = here;
    sum += 2 * here;
    const below = above + ((2 * n) / t) * here;
    above = here;
    here = below;
    if (here > 1e200) {
      // Rescaling by a power of two changes no digit.
      const scale = 1.1830521861667747e-271; // 2^−900
      here *= scale;
      above *= scale;
      sum *= scale;
      for (let m = n; m <= highest; m++) values[m] *= scale;
    }
  }
  values[0] = here;
  sum += here;
  for (let n = 0; n <= highest; n++) values[n] /= sum;
  return values;
}
