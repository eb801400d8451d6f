import { apiRoutes } from './features/api/api.routes.ts';
import { accountRoutes } from './features/account/account.routes.ts';
import { tokenRoutes } from './features/account/token.routes.ts';
import { inviteRoutes } from './features/auth/invite.routes.ts';
import { passwordResetRoutes } from './features/auth/password-reset.routes.ts';
import { sessionRoutes } from './features/auth/session.routes.ts';
import { setupRoutes } from './features/auth/setup.routes.ts';
import { briefRoutes } from './features/briefs/brief.routes.ts';
import { comparisonRoutes } from './features/comparisons/comparison.routes.ts';
import { costsRoutes } from './features/costs/costs.routes.ts';
import { fitRoutes } from './features/fits/fit.routes.ts';
import { healthRoutes } from './features/health/health.routes.ts';
import { teamInviteRoutes } from './features/team/invites.routes.ts';
import { optionFileRoutes } from './features/options/files/option-files.routes.ts';
import { optionRoutes } from './features/options/option.routes.ts';
import { runRoutes } from './features/runs/run.routes.ts';
import { workingGridRoutes } from './features/sites/working-grid/working-grid.routes.ts';
import { featureRoutes } from './features/sites/features/feature.routes.ts';
import { uploadRoutes } from './features/sites/uploads/upload.routes.ts';
import { layerRoutes } from './features/sites/layer.routes.ts';
import { plantRoutes } from './features/plants/plant.routes.ts';
import { outlookRoutes } from './features/sites/outlooks/outlook.routes.ts';
import { siteRoutes } from './features/sites/site.routes.ts';
import { memberRoutes } from './features/team/members.routes.ts';
import { outboxRoutes } from './features/team/outbox.routes.ts';
import type { Route } from './middleware/route.ts';
import type { Services } from './services.ts';

/** Every route of the product. */
export function allRoutes(services: Services): Route[] {
  const routes = [
    ...healthRoutes(services),
    ...sessionRoutes(services),
    ...setupRoutes(services),
    ...inviteRoutes(services),
    ...passwordResetRoutes(services),
    ...accountRoutes(services),
    ...tokenRoutes(services),
    ...memberRoutes(services),
    ...teamInviteRoutes(services),
    ...outboxRoutes(services),
    ...plantRoutes(services),
    ...siteRoutes(services),
    ...outlookRoutes(services),
    ...layerRoutes(services),
    ...featureRoutes(services),
    ...uploadRoutes(services),
    ...workingGridRoutes(services),
    ...optionRoutes(services),
    ...optionFileRoutes(services),
    ...costsRoutes(services),
    ...runRoutes(services),
    ...comparisonRoutes(services),
    ...fitRoutes(services),
    ...briefRoutes(services),
  ];
  return [...routes, ...apiRoutes(routes)];
}
