const ratio = (Math.sqrt(5) - 1) / 2;
const looks = 24;

/**
 * Where a function of one variable is largest: the best of evenly spread looks, then golden-section search between its
 * neighbours (Kiefer 1953, Proc. AMS 4:502), to 1e-7 of the range.
 */
export function largestOf(
  f: (x: number) => number,
  low: number,
  high: number,
): { readonly at: number; readonly value: number } {
  const step = (high - low) / looks;
  let start = { at: low, value: -Infinity };
  for (let i = 0; i <= looks; i++) {
    const at = low + i * step;
    const value = f(at);
    if (value > start.value) start = { at, value };
  }
  let a = Math.max(low, start.at - step);
  let b = Math.min(high, start.at + step);
  let [x, y] = [b - ratio * (b - a), a + ratio * (b - a)];
  let [fx, fy] = [f(x), f(y)];
  while (b - a > 1e-7 * (high - low)) {
    if (fx > fy) {
      [b, y, fy] = [y, x, fx];
      x = b - ratio * (b - a);
      fx = f(x);
    } else {
      [a, x, fx] = [x, y, fy];
      y = a + ratio * (b - a);
      fy = f(y);
    }
  }
  const at = (a + b) / 2;
  return { at, value: f(at) };
}
