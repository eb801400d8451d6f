import type { Role } from '#contract/people.ts';

/** Rasters, classes, plant and outlook are the modeller's. */
export const keepers: readonly Role[] = ['modeller', 'admin'];
