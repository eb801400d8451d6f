import { getHealth } from '#contract/people.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { productVersion } from '#server/project.ts';
import type { Services } from '#server/services.ts';

export const healthRoutes = ({ dataSource }: Services): Route[] => [
  route(
    getHealth,
    'anyone',
    async () => {
      await dataSource.query('SELECT 1');
      return { status: 'ok' as const, version: productVersion };
    },
    { tokens: 'taken' },
  ),
];
