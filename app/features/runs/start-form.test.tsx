import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import { StartForm } from './start-form.tsx';
import { siteFixture } from './testing/site-fixture.ts';

afterEach(cleanup);

const option = (id: string, wait: boolean) => ({ id, name: id, wait, works: [] }) as unknown as Option;
const show = (waitRun?: { name: string; seed: string; mode: string }) =>
  render(
    <StartForm
      site={siteFixture()}
      options={[option('Wait', true), option('Mounds', false), option('Fence', false)]}
      startId="Mounds"
      names={[]}
      waitRun={waitRun}
      busy={false}
      error={undefined}
      onStart={() => undefined}
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
