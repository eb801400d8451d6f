import type { Role } from '#contract/people.ts';
import type { SiteSummary } from '#contract/sites.ts';

export interface NextStep {
  /** `/sites/…` page where it is done */
  to: string;
  /** what is missing, in words */
  words: string;
  /** what the button says */
  action: string;
  /** roles that can do it */
  roles: readonly Role[];
}

/** What a site needs next, or undefined when it has all it needs. */
export function nextStep(site: SiteSummary): NextStep | undefined {
  const ground: readonly Role[] = ['modeller', 'admin'];
  const works: readonly Role[] = ['modeller', 'manager', 'admin'];
  const missing = (['habitat', 'cover'] as const).filter((part) => !site.parts.includes(part));
  if (missing.length > 0) {
    return {
      to: `/sites/${site.id}/ground`,
      words: `needs ${missing.map((part) => `a ${part} layer`).join(' and ')}`,
      action: 'Go to Ground',
      roles: ground,
    };
  }
  // Wait is always there, so one option means that nothing is drawn yet.
  if (site.options <= 1) {
    return {
      to: `/sites/${site.id}/options`,
      words: 'has nothing drawn beside Wait',
      action: 'Go to Options',
      roles: works,
    };
  }
  if (site.runs === 0) {
    return { to: `/sites/${site.id}/runs`, words: 'has no run yet', action: 'Go to Runs', roles: works };
  }
  return undefined;
}

/** 0..1: how much of the way from ground to a run is done. */
export function siteShare(site: SiteSummary): number {
  const done = [
    site.parts.includes('habitat'),
    site.parts.includes('cover'),
    site.options > 1,
    site.runs > 0,
  ].filter(Boolean).length;
  return done / 4;
}
