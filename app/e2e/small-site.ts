import type { Page } from '@playwright/test';
import { inventedSite } from './invented-site.ts';

/** An invented site of 60 × 60 cells, made through the API: a strip stands in the west, one option plants the middle. */
export async function smallSite(page: Page, teamId: string, name: string): Promise<string> {
  const { siteId } = await inventedSite(page.request, teamId, {
    name,
    side: 60,
    years: 20,
    cover: (column) => (column < 12 ? 0.8 : 0),
    options: [
      {
        name: 'Clumps',
        works: ({ originX, originY }) => [
          {
            kind: 'clumps',
            year: 2027,
            points: [20, 32, 44, 56].flatMap((x) =>
              [8, 23, 38, 53].map((y): [number, number] => [originX + x, originY - y]),
            ),
            each: 6,
          },
        ],
      },
    ],
  });
  return siteId;
}
