import { act, render } from '@testing-library/react';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { expect, it } from 'vitest';
import { useSearchPatch } from './use-search-patch.ts';

it('keeps what another change has written since the last render', async () => {
  let patch: ReturnType<typeof useSearchPatch> = () => undefined;
  function Probe() {
    patch = useSearchPatch();
    return null;
  }
  window.history.replaceState(null, '', '/?year=2030&layer=cover');
  const router = createBrowserRouter([{ path: '/', element: <Probe /> }]);
  render(<RouterProvider router={router} />);
  const stale = patch;
  await act(async () => {
    stale({ year: '2038' });
    // The router writes the address in a microtask; React renders later.
    await Promise.resolve();
    stale({ show: 'closing', layer: undefined });
    await new Promise((done) => setTimeout(done, 0));
  });
  expect(window.location.search).toBe('?year=2038&show=closing');
  expect(window.location.pathname).toBe('/');
});
