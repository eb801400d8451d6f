import * as contract from '#contract/api.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { apiPage } from './api-page.ts';
import { describeApi, type ApiDescription } from './describe-api.ts';

/** The API about itself: its description for programs, and as a page for people. */
export function apiRoutes(others: readonly Route[]): Route[] {
  let described: ApiDescription | undefined;
  const describe = () => (described ??= describeApi([...others, ...own]));
  const own: Route[] = [
    route(contract.getApiDescription, 'anyone', () => describe(), { tokens: 'taken' }),
    route(
      contract.getApiPage,
      'anyone',
      () => ({ bytes: Buffer.from(apiPage(describe())), type: 'text/html; charset=utf-8' }),
      { tokens: 'taken' },
    ),
  ];
  return own;
}
