import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen } from '@testing-library/react';
import { createMemoryRouter, Outlet, RouterProvider } from 'react-router-dom';
import { afterEach, expect, it } from 'vitest';
import { comparisonsQuery } from '#app/features/comparisons/get-comparison.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { WatchStep } from './watch-step.tsx';

afterEach(cleanup);

const run = (id: string, status: string, optionId: string) => ({
  id,
  name: `Run ${id}`,
  status,
  optionId,
  surveyYear: 2026,
});

function show(props: Parameters<typeof WatchStep>[0], runs: unknown[], comparisons: unknown[]) {
  const client = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity } } });
  client.setQueryData(runsQuery('s').queryKey, { runs } as never);
  client.setQueryData(comparisonsQuery('s').queryKey, { comparisons } as never);
  const routes = [
    {
      element: <Outlet context={{ site: { id: 's' } }} />,
      children: [{ path: '/', element: <WatchStep {...props} /> }],
    },
  ];
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={createMemoryRouter(routes)} />
    </QueryClientProvider>,
  );
  return screen.queryAllByRole('link').map((link) => [link.textContent, link.getAttribute('href')]);
}

const runs = [run('3', 'running', 'a'), run('2', 'finished', 'b'), run('1', 'finished', 'a')];
const comparisons = [
  { id: 'x', name: 'Begun', done: 0 },
  { id: 'y', name: 'Wait or mounds', done: 24 },
];
const watch = (id: string) => [`Watch Run ${id}`, `/sites/s/runs/${id}?year=2026`];
const open = ['Open Wait or mounds', '/sites/s/compare/y'];

it('leads to the newest finished run from its survey on, and to the newest comparison with futures', () => {
  expect(show({ first: 'run' }, runs, comparisons)).toEqual([watch('2'), open]);
});

it('puts first what the page is about, and keeps to the option that is shown', () => {
  expect(show({ first: 'comparison', optionId: 'a' }, runs, comparisons)).toEqual([open, watch('1')]);
});

it('says so where there is nothing to watch', () => {
  expect(show({ first: 'run' }, [run('3', 'running', 'a')], [])).toEqual([]);
  expect(screen.getByText(/Nothing to watch yet/)).toBeTruthy();
});
