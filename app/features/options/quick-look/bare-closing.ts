import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';

/** When the ground closes that was still open at the survey: what stood then says nothing about the works. */
export interface BareClosing {
  /** m² that can close and did not stand at the survey */
  readonly bare: number;
  /** first year by which each share of it has closed; undefined: not by the horizon */
  readonly years: readonly { readonly share: number; readonly year: number | undefined }[];
}

const shares = [0.5, 0.8, 0.9];

export function bareClosing({ closable, closedBy }: ClosingSummary): BareClosing {
  const stood = closedBy[0]?.area ?? 0;
  const bare = Math.max(0, closable - stood);
  const yearOf = (share: number) =>
    bare > 0
      ? closedBy.find(({ area }) => area - stood >= share * bare * (1 - 1e-9) && area > stood)?.year
      : undefined;
  return { bare, years: shares.map((share) => ({ share, year: yearOf(share) })) };
}
