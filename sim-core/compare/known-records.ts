import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';

/** Replicates that are known of each ensemble, `[option][outlook]`, each by its number. */
export type KnownRecords = readonly (readonly ReadonlyMap<number, ReplicateRecord>[])[];

/** Numbers of the replicates that every ensemble has: those that make pairs. Ascending. */
export function sharedReplicates(known: KnownRecords): number[] {
  const [first, ...others] = known.flat();
  return [...(first?.keys() ?? [])]
    .filter((replicate) => others.every((records) => records.has(replicate)))
    .sort((a, b) => a - b);
}
