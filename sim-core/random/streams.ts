import seedrandom from 'seedrandom';

/** What a stream of random numbers is for; the number is the replicate. */
export type Purpose =
  | `shoots/${number}`
  | `events/${number}`
  | `fragments/${number}`
  | `weather/${number}`
  | `losses/${number}/${number}`
  | `parameters`
  | `parameters/${number}/${string}`
  | `survey`
  | `screening`
  | `indices`
  | `bootstrap`
  | `fit/prior`
  | `fit/check`
  | `fit/${number}/${number}`
  | `fit-errors/${number}/${number}`
  | `pattern/${string}`;

/**
 * The stream of one purpose: seedrandom 3 (ARC4) keyed by `seed/purpose`, so that no process ever takes another's
 * numbers and adding a process changes no other's.
 */
export const stream = (seed: string, purpose: Purpose): seedrandom.PRNG => seedrandom(`${seed}/${purpose}`);

/** Key of the counter-based draws of a purpose: two 32-bit words from its stream. */
export interface PhiloxKey {
  readonly k0: number;
  readonly k1: number;
}

export function philoxKey(seed: string, purpose: Purpose): PhiloxKey {
  const words = stream(seed, purpose);
  const k0 = words.int32() >>> 0;
  const k1 = words.int32() >>> 0;
  return { k0, k1 };
}
