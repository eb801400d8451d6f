import { exp } from './exp.ts';
import { log } from './log.ts';

/**
 * x^y for x ≥ 0, the same bits on every machine: e^(y ln x), so about |y ln x| ulp from the exact value. 0^0 is 1.
 */
export const power = (x: number, y: number): number => (y === 0 ? 1 : exp(y * log(x)));
