import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import type { ComparisonPlan } from '#contract/comparisons.ts';
import { studyDesign } from '#sim-core/matters/study-design.ts';
import { studyFigures } from '#sim-core/matters/study-figures.ts';
import type { Beliefs } from '#sim-core/spec/uncertain.ts';
import { studyCsv } from './matters-files.ts';
import { StudyCharts } from './study-charts.tsx';
import { StudyForm } from './study-form.tsx';
import { measuredWords, readSettings } from './study-settings.ts';

afterEach(cleanup);

const rates: Beliefs = {
  lateralSpread: { law: 'uniform', low: 1, high: 2 },
  fillRate: { law: 'uniform', low: 1, high: 2 },
};
const figuresOf = (method: 'one-at-a-time' | 'screening' | 'indices', size: number) => {
  const design = studyDesign({ method, size, seed: 's', rates, luck: false });
  return studyFigures(design, (i) => 10 * design.points[i].rates.lateralSpread!, 's')!;
};
const cells = () =>
  within(screen.getAllByRole('table', { hidden: true })[0])
    .getAllByRole('row', { hidden: true })
    .slice(1)
    .map((row) => row.textContent);

it('says the ends of each rate in a table, from the widest', () => {
  render(<StudyCharts figures={figuresOf('one-at-a-time', 1)} unit="years" digits={1} />);
  expect(cells()).toEqual(['Lateral spread1.051.95 m/yr10.519.5', expect.stringMatching(/15.?0?15.?0?$/)]);
});

it('says effects and indices in a table', () => {
  const { unmount } = render(<StudyCharts figures={figuresOf('screening', 4)} unit="years" digits={1} />);
  expect(cells()[0]).toMatch(/^Lateral spread9\D*0\D*9/);
  unmount();
  render(<StudyCharts figures={figuresOf('indices', 64)} unit="years" digits={1} />);
  expect(cells()[0]).toMatch(/^Lateral spread\d+ % \(.*\)\d+ % \(/);
  expect(cells()[1]).toMatch(/^Fill-in rate0 % \(0 to 0\)0 % \(0 to 0\)$/);
});

it('writes what was found as CSV', () => {
  const lines = studyCsv(figuresOf('one-at-a-time', 1), 'years').trim().split('\r\n');
  expect(lines[0]).toBe('rate,label,share_of_belief,value,mean_years,futures');
  expect(lines[1]).toBe('lateralSpread,Lateral spread,0.05,1.05,10.5,1');
  expect(lines).toHaveLength(11);
  expect(studyCsv(figuresOf('indices', 16), 'years').split('\r\n')[1]).toMatch(
    /^lateralSpread,Lateral spread,[\d.]+,/,
  );
});

const plan = {
  options: [
    { name: 'Wait', wait: true },
    { name: 'Mounds', wait: false },
  ],
  outlooks: [{ name: 'As drawn' }],
  common: { surveyYear: 2024, years: 10 },
} as unknown as ComparisonPlan;
const settingsOf = (search: string) => readSettings(new URLSearchParams(search), plan);

it('reads what an address asks, and the usual where it asks what cannot be', () => {
  expect(settingsOf('')).toEqual({
    option: 1,
    than: undefined,
    outlook: 0,
    measure: { kind: 'recovery' },
    method: 'one-at-a-time',
    size: 4,
    luck: true,
  });
  expect(settingsOf('option=0&than=1&measure=closed&year=2030&method=indices&size=128&luck=common')).toEqual({
    option: 0,
    than: 1,
    outlook: 0,
    measure: { kind: 'closed', year: 2030 },
    method: 'indices',
    size: 128,
    luck: false,
  });
  expect(settingsOf('option=9&than=1&outlook=-1&measure=x&method=y&size=1.5')).toMatchObject({
    option: 1,
    than: undefined,
    outlook: 0,
    measure: { kind: 'recovery' },
    size: 4,
  });
  expect(measuredWords(settingsOf('than=0&measure=covered'), plan)).toBe(
    'the difference in the covered area in 2034 between “Mounds” and “Wait”',
  );
});

it('says what is wrong with a size, and tells only sizes that fit', () => {
  const onChange = vi.fn();
  render(<StudyForm settings={settingsOf('method=indices')} disabled={false} onChange={onChange} />);
  const blank = screen.getByLabelText('Number of rows');
  fireEvent.change(blank, { target: { value: '8' } });
  expect(screen.getByRole('alert').textContent).toBe(
    'Found “8” rows; a whole number from 16 to 2048 is expected.',
  );
  expect(onChange).not.toHaveBeenCalled();
  fireEvent.change(blank, { target: { value: '80' } });
  expect(onChange).toHaveBeenLastCalledWith({ size: '80' });
  expect(screen.queryByRole('alert')).toBeNull();
});
