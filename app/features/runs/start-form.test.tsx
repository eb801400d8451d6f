import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import type { Option } from '#contract/options.ts';
import { StartForm, type StartedRun } from './start-form.tsx';
import { siteFixture } from './testing/site-fixture.ts';

afterEach(cleanup);

const option = (id: string, wait: boolean) => ({ id, name: id, wait, works: [] }) as unknown as Option;
const started = vi.fn<(run: StartedRun) => void>();
const show = (waitRun?: { name: string; seed: string; mode: string }, site = siteFixture()) =>
  render(
    <StartForm
      site={site}
      options={[option('Wait', true), option('Mounds', false), option('Fence', false)]}
      startId="Mounds"
      names={[]}
      waitRun={waitRun}
      busy={false}
      error={undefined}
      onStart={started}
    />,
  );
const seed = () => screen.getByLabelText<HTMLInputElement>(/^Seed/);
const choose = (name: string) =>
  fireEvent.change(screen.getByLabelText('Option to run'), { target: { value: name } });
const waitRun = { name: 'Wait, run 1', seed: 'neap-curlew-1', mode: 'counts' };

it('gives an option the seed of Wait and says so, Wait itself one of its own', () => {
  show(waitRun);
  expect(seed().value).toBe('neap-curlew-1');
  screen.getByText(/The seed is that of “Wait, run 1”/);
  choose('Wait');
  expect(seed().value).not.toBe('neap-curlew-1');
  expect(screen.queryByText(/The seed is that of/)).toBeNull();
});

it('draws another seed when asked, and goes back', () => {
  show(waitRun);
  fireEvent.click(screen.getByRole('button', { name: 'another seed' }));
  expect(seed().value).not.toBe('neap-curlew-1');
  fireEvent.click(screen.getByRole('button', { name: /^same luck/ }));
  expect(seed().value).toBe('neap-curlew-1');
});

it('keeps what was typed when another option is chosen', () => {
  show(waitRun);
  fireEvent.change(seed(), { target: { value: 'mine' } });
  fireEvent.change(screen.getByLabelText('Name of the run'), { target: { value: 'My run' } });
  choose('Fence');
  expect(seed().value).toBe('mine');
  expect(screen.getByLabelText<HTMLInputElement>('Name of the run').value).toBe('My run');
});

it('draws a seed where there is no run of Wait', () => {
  show();
  expect(seed().value).toMatch(/^[a-z]+-[a-z]+-\d{4}$/);
});

it('takes a drawn future where the outlook draws its weather, another when asked, or its listed years', () => {
  const drawn = { kind: 'palmer-type', standardDeviation: 2 } as const;
  const { outlook } = siteFixture();
  const id = '00000000-0000-4000-8000-000000000077';
  const otherOutlooks = [{ ...outlook, name: 'Listed', droughtIndex: [-1, -1, -1, -1], id }];
  show(undefined, siteFixture({ outlook: { ...outlook, drawn }, otherOutlooks }));
  const spec = () => {
    fireEvent.click(screen.getByRole('button', { name: 'Start the run' }));
    return started.mock.lastCall![0].spec;
  };
  expect(spec()).toMatchObject({ droughtIndex: drawn, replicate: 0 });
  const future = screen.getByLabelText('Number of the drawn future');
  fireEvent.change(future, { target: { value: '7' } });
  expect(spec()).toMatchObject({ droughtIndex: drawn, replicate: 6 });
  fireEvent.change(future, { target: { value: '0' } });
  screen.getByText(/Found “0” as the future; a whole number from 1/);
  expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Start the run' }).disabled).toBe(true);
  fireEvent.change(screen.getByLabelText('Weather of the run'), { target: { value: 'listed' } });
  expect(spec()).toMatchObject({ droughtIndex: outlook.droughtIndex, replicate: 0 });
  fireEvent.change(screen.getByLabelText('Outlook of the run'), { target: { value: id } });
  expect(spec()).toMatchObject({ droughtIndex: [-1, -1, -1, -1] });
  expect(screen.queryByLabelText('Weather of the run')).toBeNull();
});
