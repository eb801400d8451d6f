import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createQueryClient } from '#app/lib/query-client.ts';
import { Page } from './sign-in-page.tsx';

// The picture runs the engine in a worker, which this environment has not.
vi.mock('./how-it-works.tsx', () => ({ HowItWorks: () => null }));

const account = { role: 'manager', email: 'ines@northmarsh.example', password: 'lowtide-demo' };
let sent: unknown[] = [];
let accepts = true;

beforeEach(() => {
  sent = [];
  accepts = true;
  let signedIn = false;
  vi.spyOn(globalThis, 'fetch').mockImplementation((url, init) => {
    if (url === '/api/demo-accounts') return Promise.resolve(Response.json({ accounts: [account] }));
    if (init?.method === 'POST') {
      sent.push(JSON.parse(init.body as string));
      signedIn = accepts;
    }
    if (init?.method === 'POST' && !accepts)
      return Promise.resolve(
        Response.json(
          {
            type: 'x',
            title: 'x',
            status: 401,
            detail: 'They do not belong together.',
            code: 'wrong-credentials',
          },
          { status: 401 },
        ),
      );
    const person = signedIn
      ? { id: '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c11', name: 'Ines', email: account.email }
      : null;
    return Promise.resolve(Response.json({ person, memberships: [], demo: true }));
  });
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

function open() {
  const router = createMemoryRouter(
    [
      { path: '/sign-in', Component: Page },
      { path: '/sites/4', element: <p>The site</p> },
    ],
    { initialEntries: ['/sign-in?to=%2Fsites%2F4'] },
  );
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}
const press = (name: string | RegExp) => fireEvent.click(screen.getByRole('button', { name }));

describe('sign-in page', () => {
  it('fills in a demo account, signs in and goes where one wanted to go', async () => {
    open();
    await screen.findByText(account.email);
    press(/manager/);
    press('Sign in');
    expect(await screen.findByText('The site')).toBeTruthy();
    expect(sent).toEqual([{ email: account.email, password: account.password }]);
  });

  it('says at the field what is wrong, and sends nothing', async () => {
    open();
    fireEvent.change(screen.getByLabelText('E-mail'), { target: { value: 'nonsense' } });
    press('Sign in');
    expect(await screen.findByText(/Expected an e-mail address/)).toBeTruthy();
    expect(screen.getByText('Give your password')).toBeTruthy();
    expect(screen.getByLabelText('E-mail').getAttribute('aria-invalid')).toBe('true');
    expect(sent).toEqual([]);
  });

  it('keeps the form and shows the server’s words when refused', async () => {
    accepts = false;
    open();
    await screen.findByText(account.email);
    press(/manager/);
    press('Sign in');
    await waitFor(() => expect(screen.getByRole('alert').textContent).toBe('They do not belong together.'));
    expect(screen.getByLabelText<HTMLInputElement>('E-mail').value).toBe(account.email);
  });
});
