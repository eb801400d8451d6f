import { roles, type Role } from '#contract/people.ts';
import * as contract from '#contract/plants.ts';
import { route, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import {
  addPlant,
  addPlantVersion,
  changePlant,
  copyPlant,
  listPlants,
  plantVersion,
} from './plant.service.ts';

/** Rates are the modeller's. */
const keepers: readonly Role[] = ['modeller', 'admin'];

/** The team's library of plants. */
export function plantRoutes(services: Services): Route[] {
  const { manager } = services.dataSource;
  return [
    route(contract.listPlants, { team: roles }, async ({ params }) => ({
      plants: await listPlants(manager, params.teamId),
    })),
    route(contract.addPlant, { team: keepers }, ({ params, body, person }) =>
      addPlant(services, params.teamId, body, person.name),
    ),
    route(contract.addPlantVersion, { team: keepers }, ({ params, body, person }) =>
      addPlantVersion(services, params, body, person.name),
    ),
    route(contract.getPlantVersion, { team: roles }, ({ params }) => plantVersion(manager, params)),
    route(contract.copyPlant, { team: keepers }, ({ params, body, person }) =>
      copyPlant(services, params, body.name, person.name),
    ),
    route(contract.changePlant, { team: keepers }, ({ params, body }) => changePlant(services, params, body)),
  ];
}
