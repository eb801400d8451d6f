/**
 * Sum of all values with a running correction for what each addition rounds away (Neumaier 1974, Zeitschrift für
 * angewandte Mathematik und Mechanik 54:39–51), so that the error does not grow with their number.
 */
export function sumOf(values: ArrayLike<number>): number {
  let sum = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return sum + lost;
}

/** Mean and spread of values that come one by one. */
export interface Moments {
  add(value: number): void;
  readonly count: number;
  /** NaN of nothing */
  readonly mean: number;
  /** sample variance, divisor n − 1; NaN of fewer than two values */
  readonly variance: number;
  /** square root of `variance` */
  readonly standardDeviation: number;
}

/**
 * One-pass mean and variance by updating the mean and the sum of squares around it (Welford 1962, Technometrics
 * 4:419–420): the textbook difference of two sums loses every digit when the mean is large against the spread.
 */
export function moments(values: Iterable<number> = []): Moments {
  let count = 0;
  let mean = 0;
  let squares = 0;
  const all: Moments = {
    add(value) {
      count++;
      const before = value - mean;
      mean += before / count;
      squares += before * (value - mean);
    },
    get count() {
      return count;
    },
    get mean() {
      return count > 0 ? mean : NaN;
    },
    get variance() {
      return count > 1 ? squares / (count - 1) : NaN;
    },
    get standardDeviation() {
      return Math.sqrt(all.variance);
    },
  };
  for (const value of values) all.add(value);
  return all;
}
