import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { callEndpoint } from '#app/lib/api-client.ts';
import { createQueryClient } from '#app/lib/query-client.ts';
import { signOut, type Session } from '#contract/people.ts';
import { pageAfterSignIn, SignedIn, signInPath } from './signed-in.tsx';

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const ines: Session = {
  person: { id: '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c11', name: 'Ines', email: 'ines@northmarsh.example' },
  memberships: [],
  demo: false,
};
const nobody: Session = { ...ines, person: null };

/** A server that knows who is signed in and refuses everything else. */
function serve(session: () => Session | undefined) {
  vi.spyOn(globalThis, 'fetch').mockImplementation((_, init) => {
    const now = session();
    if (now === undefined) return Promise.reject(new TypeError('offline'));
    if (init?.method === 'GET') return Promise.resolve(Response.json(now));
    const problem = { type: 'x', title: 'x', status: 401, detail: 'Sign in.', code: 'not-signed-in' };
    return Promise.resolve(Response.json(problem, { status: 401 }));
  });
}

function openAt(path: string) {
  const router = createMemoryRouter(
    [
      { Component: SignedIn, children: [{ path: '/sites/:id', element: <p>The site</p> }] },
      { path: '/sign-in', element: <p>The door</p> },
    ],
    { initialEntries: [path] },
  );
  const client = createQueryClient();
  client.setDefaultOptions({ queries: { retry: false } });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return router;
}

describe('SignedIn', () => {
  it('lets in who is signed in', async () => {
    serve(() => ines);
    openAt('/sites/4?year=2031');
    expect(await screen.findByText('The site')).toBeTruthy();
  });

  it('sends who is not to the door, and remembers the whole address', async () => {
    serve(() => nobody);
    const router = openAt('/sites/4?year=2031');
    expect(await screen.findByText('The door')).toBeTruthy();
    const to = new URLSearchParams(router.state.location.search).get('to');
    expect(to).toBe('/sites/4?year=2031');
    expect(pageAfterSignIn(to)).toBe('/sites/4?year=2031');
  });

  it('sends to the door when any call finds that the session is over', async () => {
    let session = ines;
    serve(() => session);
    openAt('/sites/4');
    await screen.findByText('The site');
    session = nobody;
    await expect(callEndpoint(signOut, {})).rejects.toThrow('Sign in.');
    expect(await screen.findByText('The door')).toBeTruthy();
  });

  it('says that the server cannot be reached, and does not call that signed out', async () => {
    serve(() => undefined);
    openAt('/sites/4');
    expect(await screen.findByText('Foothold cannot be reached')).toBeTruthy();
  });
});

describe('where to go after signing in', () => {
  it.each([
    [null, '/'],
    ['/team/1', '/team/1'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    ['javascript:alert(1)', '/'],
    ['/sign-in?to=/x', '/'],
  ])('%s → %s', (to, page) => expect(pageAfterSignIn(to)).toBe(page));

  it('asks for nothing when the first page was wanted', () => expect(signInPath('/')).toBe('/sign-in'));
});
