import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { AccessToken } from '#contract/access-tokens.ts';
import { TokenSection } from './token-section.tsx';

const teamId = '3f0c1f0e-6a4e-4a3b-9d0e-0e1f2a3b4c5d';
const secret = `fh_${'k'.repeat(43)}`;
let tokens: AccessToken[];
let sent: { method: string; path: string; body: unknown }[];

const row = (changes: Partial<AccessToken> = {}): AccessToken => ({
  id: crypto.randomUUID(),
  name: 'Nightly export',
  start: 'fh_kkkkk',
  scope: 'read',
  team: null,
  createdAt: '2026-12-01T10:00:00.000Z',
  expiresAt: '2999-01-01T00:00:00.000Z',
  lastUsedAt: null,
  revokedAt: null,
  ...changes,
});

beforeEach(() => {
  tokens = [];
  sent = [];
  vi.stubGlobal(
    'fetch',
    (input: string, { method = 'GET', body }: { method?: string; body?: string } = {}) => {
      const path = new URL(input, 'http://localhost').pathname;
      const json = body ? (JSON.parse(body) as { name: string }) : undefined;
      if (method !== 'GET') sent.push({ method, path, body: json });
      if (method === 'DELETE') {
        tokens = tokens.map((token) => ({ ...token, revokedAt: '2026-12-01T12:00:00.000Z' }));
        return Promise.resolve(new Response(null, { status: 204 }));
      }
      if (method === 'GET') return Promise.resolve(Response.json({ tokens }));
      tokens = [row({ name: json!.name })];
      return Promise.resolve(Response.json({ token: secret, made: tokens[0] }));
    },
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const show = () =>
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <TokenSection memberships={[{ teamId, teamName: 'Marsh team', role: 'modeller' }]} />
    </QueryClientProvider>,
  );

describe('TokenSection', () => {
  it('makes a token as asked, and shows it until its owner has it, once', async () => {
    show();
    fireEvent.click(await screen.findByRole('button', { name: 'Make a token' }));
    fireEvent.click(screen.getByRole('button', { name: 'Make the token' }));
    expect(await screen.findByText('Fill this in')).toBeTruthy();
    fireEvent.change(screen.getByLabelText('What the token is for'), { target: { value: 'Nightly' } });
    fireEvent.change(screen.getByLabelText('In'), { target: { value: teamId } });
    fireEvent.change(screen.getByLabelText('It ends'), { target: { value: 'date' } });
    fireEvent.click(screen.getByRole('button', { name: 'Make the token' }));
    expect(await screen.findByText(/A day from today/)).toBeTruthy();
    expect(sent).toEqual([]);
    fireEvent.change(screen.getByLabelText('It ends'), { target: { value: '30' } });
    fireEvent.click(screen.getByRole('button', { name: 'Make the token' }));
    const field = await screen.findByLabelText<HTMLInputElement>(/The token “Nightly”/);
    expect(field.value).toBe(secret);
    const body = sent[0].body as { expiresAt: string };
    expect(body).toMatchObject({ name: 'Nightly', scope: 'read', teamId });
    expect((Date.parse(body.expiresAt) - Date.now()) / 86_400_000).toBeCloseTo(30, 1);
    fireEvent.click(screen.getByRole('button', { name: 'I have it' }));
    expect(screen.queryByDisplayValue(secret)).toBeNull();
    expect(await screen.findByRole('cell', { name: /Nightly/ })).toBeTruthy();
  });

  it('revokes after asking, and says of what ended how', async () => {
    tokens = [row()];
    show();
    fireEvent.click(await screen.findByRole('button', { name: 'Revoke Nightly export' }));
    expect(sent).toEqual([]);
    fireEvent.click(screen.getByRole('button', { name: 'Revoke it' }));
    await waitFor(() => expect(screen.getByRole('cell', { name: /revoked 1 Dec 2026/ })).toBeTruthy());
    expect(sent).toHaveLength(1);
    expect(screen.queryByRole('button', { name: /^Revoke/ })).toBeNull();
  });
});
