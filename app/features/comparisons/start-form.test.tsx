import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Option } from '#contract/options.ts';
import { startComparison } from '#contract/comparisons.ts';
import { unchangedOutlook } from '#contract/outlooks.ts';
import type { Site } from '#contract/sites.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { ComparisonStartForm } from './start-form.tsx';

afterEach(cleanup);

const ids = ['1', '2', '3'].map((n) => `00000000-0000-4000-8000-00000000000${n}`);
const site = {
  id: ids[0],
  grid: { width: 10, height: 10, cellSize: 1, originX: 0, originY: 0, epsg: 32617 },
  plant: { name: 'Grass', rates: defaultRates, beliefs: {} },
  outlook: {
    ...unchangedOutlook,
    surveyYear: 2026,
    years: 5,
    stepsPerYear: 1,
    boundary: 'mirror',
    droughtIndex: [0, 0, -3, 0, 0],
    drawn: null,
  },
  otherOutlooks: [],
  droughtRecord: null,
} as unknown as Site;
const options = ['Wait', 'Clumps', 'Mounds'].map(
  (name, i) => ({ id: ids[i], name, works: [] }) as unknown as Option,
);

function open(blocked?: string, offered = options) {
  const onStart = vi.fn();
  render(
    <ComparisonStartForm
      site={site}
      options={offered}
      compose={(option, mode, seed) =>
        option.name === blocked || seed.trim() === ''
          ? undefined
          : runSpecSchema.parse({
              version: 1,
              mode,
              seed,
              surveyYear: 2026,
              years: 5,
              rates: defaultRates,
              droughtIndex: [0, 0, -3, 0, 0],
              layers: { capacity: 1, vigour: 1, cover: 0.5 },
            })
      }
      problems={(option) => <p>{option.name} cannot be run</p>}
      costOf={() => null}
      unitCosts={null}
      secondsOf={() => 0.1}
      drawSeed={() => 'a seed'}
      names={['Wait or Clumps and others']}
      busy={false}
      error={undefined}
      onStart={onStart}
    />,
    { wrapper: MemoryRouter },
  );
  return onStart;
}
const fill = (label: string, value: string) =>
  fireEvent.change(screen.getByLabelText(label), { target: { value } });
const start = () => screen.getByRole<HTMLButtonElement>('button', { name: 'Start the comparison' });

describe('the form that starts a comparison', () => {
  it('sends what the server takes, under a name that is free', () => {
    const onStart = open();
    fireEvent.click(screen.getByRole('checkbox', { name: /a drier one/ }));
    fill('Futures of each option', '40');
    fill('When to stop', 'chances');
    fireEvent.click(start());
    const body = startComparison.body.parse(onStart.mock.calls[0][0]);
    expect(body).toMatchObject({
      name: 'Wait or Clumps and others (2)',
      options: ids.map((optionId) => ({ optionId, cost: null })),
      replicates: 40,
      stop: { atLeast: 20, halfWidth: 0.05 },
      mapYears: [2026, 2027, 2028, 2029, 2030, 2031],
      common: { seed: 'a seed', mode: 'counts', surveyYear: 2026, years: 5 },
    });
    expect(body.outlooks).toEqual([
      { name: 'The outlook', droughtIndex: [0, 0, -3, 0, 0] },
      { name: 'Drier', droughtIndex: [-0.5, -0.5, -3.5, -0.5, -0.5] },
    ]);
  });

  it.each([
    ['Futures of each option', '1', /Found “1” futures; a whole number from 2 to 2000/],
    ['Futures of each option', '12.5', /Found “12.5” futures/],
    ['Futures of each option', 'many', /Found “many” futures/],
    [
      'Index at or below which a year counts as the next drought',
      '-16',
      /Found “-16” as the index.* −15 to 15/,
    ],
    ['Seed, from which the luck that all options share follows', ' ', /There is no seed/],
    ['Name of the comparison', ' ', /Give the comparison a name/],
  ])('refuses %s “%s” and says what it expects', (label, value, words) => {
    const onStart = open();
    fill(label, value);
    expect(screen.getByRole('alert').textContent).toMatch(words);
    expect(screen.getByLabelText(label).getAttribute('aria-invalid')).toBe('true');
    expect(start().disabled).toBe(true);
    fireEvent.submit(screen.getByRole('form'));
    expect(onStart).not.toHaveBeenCalled();
  });

  it('says where options come from while there is one alone, and blames nobody', () => {
    const onStart = open(undefined, options.slice(0, 1));
    expect(screen.queryByRole('alert')).toBeNull();
    expect(screen.getByText(/this site has only Wait/)).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Draw one on Options' }).getAttribute('href')).toBe(
      `/sites/${site.id}/options`,
    );
    fireEvent.submit(screen.getByRole('form'));
    expect(onStart).not.toHaveBeenCalled();
  });

  it('refuses a single option, and one that cannot be run', () => {
    const onStart = open('Mounds');
    expect(screen.getByText('Mounds cannot be run')).toBeTruthy();
    expect(start().disabled).toBe(true);
    fireEvent.click(screen.getByRole('checkbox', { name: 'Mounds' }));
    expect(start().disabled).toBe(false);
    fireEvent.click(screen.getByRole('checkbox', { name: 'Clumps' }));
    expect(screen.getByRole('alert').textContent).toContain('Choose at least two options');
    fireEvent.submit(screen.getByRole('form'));
    expect(onStart).not.toHaveBeenCalled();
  });
});
