/** Index that a half-sample symmetric boundary puts in the place of i: … 1 0 | 0 1 … n−1 | n−1 n−2 … */
export function mirrored(i: number, n: number): number {
  const within = ((i % (2 * n)) + 2 * n) % (2 * n);
  return within < n ? within : 2 * n - 1 - within;
}
