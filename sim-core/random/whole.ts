import type seedrandom from 'seedrandom';

/** A whole number from 0 to n − 1, each as likely: words beyond the last whole multiple of n are drawn again. */
export function wholeBelow(n: number, random: seedrandom.PRNG): number {
  const fair = Math.floor(2 ** 32 / n) * n;
  let word = random.int32() >>> 0;
  while (word >= fair) word = random.int32() >>> 0;
  return word % n;
}

/** 0 … n − 1 in an order drawn from all orders (Fisher & Yates; Durstenfeld 1964, Commun. ACM 7:420). */
export function shuffledOrder(n: number, random: seedrandom.PRNG): Uint32Array {
  const order = Uint32Array.from({ length: n }, (_, i) => i);
  for (let i = n - 1; i > 0; i--) {
    const j = wholeBelow(i + 1, random);
    [order[i], order[j]] = [order[j], order[i]];
  }
  return order;
}
