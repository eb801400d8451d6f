import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, expect, it, vi } from 'vitest';
import type { Session } from '#contract/people.ts';
import type { Upload } from '#contract/uploads.ts';
import { sendUpload } from '#app/features/layers/uploads/send-upload.ts';
import { keepUpload } from '#app/features/layers/uploads/uploads-query.ts';
import { createQueryClient } from '#app/lib/query-client.ts';
import { Page } from './new-site-page.tsx';

vi.mock('#app/features/layers/uploads/send-upload.ts', () => ({ sendUpload: vi.fn() }));

const teamId = '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c12';
const session: Session = {
  person: { id: '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c11', name: 'Ines', email: 'ines@northmarsh.example' },
  memberships: [{ teamId, teamName: 'North Marsh', role: 'modeller' }],
  demo: false,
};

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

async function open(uploads: () => Promise<Response>) {
  vi.spyOn(globalThis, 'fetch').mockImplementation((url) =>
    url === '/api/session' ? Promise.resolve(Response.json(session)) : uploads(),
  );
  const router = createMemoryRouter([{ path: '/teams/:teamId/new-site', Component: Page }], {
    initialEntries: [`/teams/${teamId}/new-site`],
  });
  const client = createQueryClient();
  await client.prefetchQuery({ queryKey: ['session'], queryFn: () => session });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return client;
}
const make = () => screen.findByRole<HTMLButtonElement>('button', { name: 'Make the site' });
const drop = () =>
  fireEvent.change(screen.getByLabelText(/Drop a GeoTIFF here/), {
    target: { files: [new File(['abc'], 'habitat.tif')] },
  });

it('takes no press while the raster is on its way, as nothing would come of it', async () => {
  let arrive: () => void = () => undefined;
  vi.mocked(sendUpload).mockReturnValue(new Promise((resolve) => (arrive = resolve as never)));
  await open(() => Promise.resolve(Response.json({ uploads: [] })));
  expect((await make()).disabled).toBe(false);
  drop();
  await waitFor(async () => expect((await make()).disabled).toBe(true));
  arrive();
  await waitFor(async () => expect((await make()).disabled).toBe(false));
});

it('keeps a raster that arrived while the list from before it was still being fetched', async () => {
  const answers: ((reply: Response) => void)[] = [];
  const client = await open(() => new Promise((resolve) => answers.push(resolve)));
  await make();
  await waitFor(() => expect(answers).toHaveLength(1));
  const upload = { id: 'u-1', teamId, siteId: null } as Upload;
  keepUpload(client, upload);
  answers[0](Response.json({ uploads: [] }));
  await waitFor(() => expect(answers).toHaveLength(2));
  expect(client.getQueryData(['uploads', teamId, undefined])).toEqual([upload]);
});
