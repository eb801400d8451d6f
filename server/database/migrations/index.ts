import { People1764547200000 } from './1764547200000-people.ts';
import { Sites1764547260000 } from './1764547260000-sites.ts';
import { LostYear1764576000000 } from './1764576000000-lost-year.ts';
import { OptionHistory1764580000000 } from './1764580000000-option-history.ts';
import { Ground1796119200000 } from './1796119200000-ground.ts';
import { Comparisons1796121000000 } from './1796121000000-comparisons.ts';
import { Outlooks1796140000000 } from './1796140000000-outlooks.ts';
import { FeatureEdges1796145000000 } from './1796145000000-feature-edges.ts';
import { Plants1796150000000 } from './1796150000000-plants.ts';
import { Fits1796156000000 } from './1796156000000-fits.ts';
import { StudyRuns1796161000000 } from './1796161000000-study-runs.ts';
import { Briefs1796170000000 } from './1796170000000-briefs.ts';
import { AccessTokens1796172000000 } from './1796172000000-access-tokens.ts';
import { RunOrigins1796174000000 } from './1796174000000-run-origins.ts';

/** Every change of the schema, oldest first. One that has been released is never edited. */
export const migrations = [
  People1764547200000,
  Sites1764547260000,
  LostYear1764576000000,
  OptionHistory1764580000000,
  Ground1796119200000,
  Comparisons1796121000000,
  Outlooks1796140000000,
  FeatureEdges1796145000000,
  Plants1796150000000,
  Fits1796156000000,
  StudyRuns1796161000000,
  Briefs1796170000000,
  AccessTokens1796172000000,
  RunOrigins1796174000000,
];
