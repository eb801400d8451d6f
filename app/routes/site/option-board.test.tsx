import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { createMemoryRouter, Outlet, RouterProvider } from 'react-router-dom';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { Feature } from '#contract/features.ts';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { startingPens } from '#app/features/options/board/board-pens.ts';
import { layerFixture, siteFixture } from '#app/features/runs/testing/site-fixture.ts';
import { createQueryClient } from '#app/lib/query-client.ts';
import type { Work } from '#contract/works.ts';
import { OptionBoard } from './option-board.tsx';
import type { SiteContext } from './use-site.ts';

const site = siteFixture();
const { grid } = site;
/** A mound in the last cell that was found at the survey. */
const surveyed = {
  id: 'surveyed',
  kind: 'refuge',
  name: '',
  strength: 1,
  halo: 0,
  shape: {
    shape: 'disc',
    x: grid.originX + (grid.width - 0.5) * grid.cellSize,
    y: grid.originY - (grid.height - 0.5) * grid.cellSize,
    radius: 1,
  },
} as Feature;
const mound = {
  id: 'm1',
  kind: 'mound' as const,
  year: 2028,
  x: grid.originX + grid.cellSize / 2,
  y: grid.originY - grid.cellSize / 2,
  radius: 1,
  strength: 1,
  halo: 0,
};
const optionWith = (works: Work[]): Option => ({
  id: '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c22',
  siteId: site.id,
  name: 'Mounds',
  note: '',
  wait: false,
  archived: false,
  works,
  sets: [],
  revision: 1,
  changedAt: '2026-12-01T00:00:00.000Z',
  changedBy: 'Invented Person',
});

beforeEach(() => {
  sessionStorage.clear();
  vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(800);
  vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(600);
  vi.spyOn(globalThis, 'fetch').mockRejectedValue(new TypeError('offline'));
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

function show(more: { works?: Work[]; on?: Site; year?: string; justMade?: boolean } = {}) {
  const on = more.on ?? site;
  const option = optionWith(more.works ?? []);
  const context: SiteContext = {
    site: on,
    teamName: 'Northmarsh',
    role: 'modeller',
    steps: [],
    mayKeepGround: true,
    mayDraw: true,
  };
  const board = (
    <OptionBoard
      options={[option]}
      option={option}
      ground={{
        refuge: new Uint8Array(grid.width * grid.height),
        error: null,
        outdated: false,
        coarse: false,
        progress: undefined,
        retry: () => undefined,
      }}
      pens={{ ...startingPens(on.outlook.surveyYear), ...(more.year !== undefined && { year: more.year }) }}
      justMade={more.justMade ?? false}
      onPens={() => undefined}
      onChoose={() => undefined}
    />
  );
  const router = createMemoryRouter([
    { element: <Outlet context={context} />, children: [{ path: '/', element: board }] },
  ]);
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  const map = screen.getByRole('application');
  return { map, press: (key: string) => fireEvent.keyDown(map, { key }) };
}
const status = () => screen.getAllByRole('status').map((node) => node.textContent);

it('starts an empty option with placing and one with works with selecting', () => {
  show();
  expect(screen.getByLabelText('Year in which it is placed')).toBeTruthy();
  cleanup();
  show({ works: [mound] });
  expect(screen.queryByLabelText('Year in which it is placed')).toBeNull();
});

it('gives the keyboard to the map of an option that was just added', () => {
  const { map } = show({ justMade: true });
  expect(document.activeElement).toBe(map);
  cleanup();
  expect(document.activeElement).not.toBe(show().map);
});

it('says in the sentence that a click placed nothing, and why', () => {
  const { press } = show({ year: '1999' });
  expect(screen.queryByText('Nothing was placed.')).toBeNull();
  press('Enter');
  const said = screen.getByText('Nothing was placed.').closest('[role="alert"]');
  expect(said?.textContent).toMatch(/Nothing was placed\. The year must be one from/);
});

it('takes back by Ctrl+Z what was placed', () => {
  const { press } = show();
  press('Enter');
  expect(status().join()).toContain('not saved');
  fireEvent.keyDown(document.body, { key: 'z', ctrlKey: true });
  expect(status().join()).toContain('Saved.');
  fireEvent.keyDown(document.body, { key: 'y', ctrlKey: true });
  expect(status().join()).toContain('not saved');
});

it('finds planned mounds first, and says why a surveyed one stays', () => {
  const { press } = show({ works: [mound], on: { ...site, features: [surveyed] } });
  press('n');
  expect(screen.getAllByText('Mound 1').length).toBeGreaterThan(0);
  press('n');
  expect(screen.queryByText('Mound 1')).toBeNull();
  expect(screen.getByText('Surveyed mound')).toBeTruthy();
  press('Delete');
  expect(screen.getByText(/was there already at the survey and cannot be removed/)).toBeTruthy();
  expect(status().join()).toContain('Saved.');
});

it('offers a run where the ground is complete, and else says what is missing', () => {
  show();
  expect(screen.getByRole('link', { name: 'Set up a run' })).toBeTruthy();
  cleanup();
  const { press } = show({ on: siteFixture({ layers: [layerFixture('habitat', { classes: null })] }) });
  press('Enter');
  expect(screen.queryByText(/et up a run/)).toBeNull();
  expect(screen.getByRole('button', { name: 'Save' })).toBeTruthy();
  const missing = screen.getByText(/A run still needs the class table of habitat and a cover layer/);
  expect(missing.querySelector('a')?.getAttribute('href')).toBe(`/sites/${site.id}/ground`);
});
