import { useOutletContext } from 'react-router-dom';
import type { Role } from '#contract/people.ts';
import type { Site } from '#contract/sites.ts';
import type { SiteStep } from '#app/features/sites/site-steps.ts';

/** What every page of a site knows. */
export interface SiteContext {
  site: Site;
  teamName: string;
  role: Role;
  steps: readonly SiteStep[];
  /** rasters, classes, plant and outlook are the modeller's (and the admin's) */
  mayKeepGround: boolean;
  /** options and runs are also the manager's */
  mayDraw: boolean;
}

/** The site of the page; only below the site's layout route. */
export const useSite = (): SiteContext => useOutletContext<SiteContext>();
