import { cleanup, render, screen, within } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it } from 'vitest';
import { StaffRule } from './staff-rule.tsx';
import { TideStaff, type StaffStep } from './tide-staff.tsx';

afterEach(cleanup);
const steps: StaffStep[] = [
  { key: 'ground', label: 'Ground', to: '/sites/1/ground', state: '3 layers', share: 1 },
  { key: 'options', label: 'Options', to: '/sites/1/options', state: '1 drawn beside Wait', share: 0.5 },
  { key: 'compare', label: 'Compare', state: 'comes with ensembles', share: 0 },
];
const show = () =>
  render(
    <MemoryRouter>
      <TideStaff title="Sallow Reach" note="Northmarsh" steps={steps} current="options" person="Ines" />
    </MemoryRouter>,
  );

describe('TideStaff', () => {
  it('says the state of each step in words and marks the present one', () => {
    show();
    const [wide] = screen.getAllByRole('navigation', { name: 'Steps' });
    const items = within(wide).getAllByRole('listitem');
    expect(items.map((item) => item.textContent)).toEqual([
      'Ground3 layers',
      'Options1 drawn beside Wait',
      'Comparecomes with ensembles',
    ]);
    expect(items.map((item) => item.getAttribute('aria-current'))).toEqual([null, 'step', null]);
  });

  it('leads nowhere from a step that is not there yet', () => {
    show();
    const [wide] = screen.getAllByRole('navigation', { name: 'Steps' });
    const links = within(wide).getAllByRole('link');
    expect(links.map((link) => link.getAttribute('href'))).toEqual(['/sites/1/ground', '/sites/1/options']);
  });

  it('folds to the number of the step', () => {
    show();
    expect(screen.getByText('Options, step 2 of 3')).toBeTruthy();
  });
});

describe('StaffRule', () => {
  it.each([
    [0, 0],
    [0.5, 5],
    [1, 10],
    [7, 10],
  ])('fills %d of its length', (share, blocks) => {
    const { container } = render(<StaffRule share={share} />);
    expect(container.querySelectorAll('rect')).toHaveLength(blocks);
  });
});
