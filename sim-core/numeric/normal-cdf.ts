import { gammaAbove } from './gamma.ts';

/** Chance that a standard normal value is at most x: half of Γ(½, x²/2) / Γ(½) in the tail. */
export function normalCdf(x: number): number {
  const tail = gammaAbove(0.5, (x * x) / 2) / 2;
  return x < 0 ? tail : 1 - tail;
}
