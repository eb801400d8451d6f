import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { createQueryClient } from '#app/lib/query-client.ts';
import { revisionQuery } from '../history/revisions.ts';
import { ConflictNotice } from './conflict-notice.tsx';

const mound = (id: string, x = 1): Work => ({
  id,
  kind: 'mound',
  year: 2027,
  x,
  y: 2,
  radius: 1.5,
  strength: 1,
  halo: 0,
});
const option = (works: Work[], more: Partial<Option> = {}): Option => ({
  id: '7b0f8a52-3a51-4d0c-9d9a-0d4a3a3b1c22',
  siteId: '0d4a3a3b-3a51-4d0c-9d9a-7b0f8a521c22',
  name: 'Mounds',
  note: '',
  wait: false,
  archived: false,
  works,
  sets: [],
  revision: 3,
  changedAt: '2026-12-01T10:00:00.000Z',
  changedBy: 'Invented Person',
  ...more,
});
const onMerge = vi.fn();

afterEach(() => {
  cleanup();
  onMerge.mockReset();
});

function show(mine: Work[], theirs: Option) {
  const client = createQueryClient();
  const base = option([mound('a'), mound('b')], { revision: 2 });
  client.setQueryData(revisionQuery(theirs.siteId, theirs.id, 2).queryKey, base);
  const nothing = () => undefined;
  render(
    <QueryClientProvider client={client}>
      <ConflictNotice
        theirs={theirs}
        mine={{ works: mine, sets: [] }}
        madeOn={2}
        busy={false}
        onKeepMine={nothing}
        onTakeTheirs={nothing}
        onMerge={onMerge}
      />
    </QueryClientProvider>,
  );
}
const deeds = () => screen.getAllByRole('button').map((button) => button.textContent);

it('says who, when and what differs, and puts changes of other works together', () => {
  show([mound('a', 5), mound('b')], option([mound('a'), mound('b'), mound('theirs')]));
  const text = screen.getByRole('alert').textContent;
  expect(text).toContain('Invented Person changed this option meanwhile.');
  expect(text).toMatch(/Theirs1 mound addedYours1 mound changed/);
  fireEvent.click(screen.getByRole('button', { name: 'Put both together' }));
  expect(onMerge.mock.calls).toEqual([[{ works: [mound('a', 5), mound('b'), mound('theirs')], sets: [] }]]);
});

it('does not put together what both changed, and says what that is', () => {
  show([mound('a', 5), mound('b')], option([mound('a', 6), mound('b')]));
  expect(deeds()).toEqual(['Keep mine as a copy', 'Take theirs']);
  expect(screen.getByRole('alert').textContent).toContain('Both of you changed 1 mound');
});

it('says that theirs went into the archive, where nobody draws', () => {
  show([mound('a', 5), mound('b')], option([mound('a'), mound('b')], { archived: true }));
  expect(screen.getByRole('alert').textContent).toContain('and put in the archive');
  expect(deeds()).toEqual(['Keep mine as a copy', 'Take theirs']);
});
