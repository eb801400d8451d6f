import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { unchangedOutlook } from '#contract/outlooks.ts';
import { startDraft } from './outlook-draft.ts';
import { SeriesDialog } from './series-dialog.tsx';

afterEach(cleanup);

const draft = startDraft({
  ...unchangedOutlook,
  surveyYear: 2026,
  years: 3,
  stepsPerYear: 1,
  boundary: 'mirror',
  droughtIndex: [0, 0, 0],
  drawn: null,
});

function open() {
  const onLay = vi.fn();
  render(<SeriesDialog draft={draft} onLay={onLay} onOpenChange={() => undefined} />);
  const paste = (value: string) =>
    fireEvent.change(screen.getByLabelText('Paste it here'), { target: { value } });
  return { onLay, paste };
}

it('names the line that is wrong and sets nothing', () => {
  const { onLay, paste } = open();
  paste('2027,-1\n2028,dry');
  expect(screen.getByRole('alert').textContent).toContain('Line 2: Found “dry” where a number was expected');
  fireEvent.click(screen.getByRole('button', { name: 'Set the years' }));
  expect(onLay).not.toHaveBeenCalled();
});

it('lays a series by its years where they fall in the simulated ones', () => {
  const { onLay, paste } = open();
  paste('2028,-1\n2099,-2');
  expect(screen.getByText(/keep what they have/).textContent).toContain('1 value is not used');
  fireEvent.click(screen.getByRole('button', { name: 'Set 1 year' }));
  expect(onLay).toHaveBeenCalledWith(new Map([[2028, -1]]));
});

it('lays a record of past years in order, unless told otherwise', () => {
  const { onLay, paste } = open();
  paste('1990;-1,5\n1991;2');
  fireEvent.click(screen.getByRole('button', { name: 'Set 2 years' }));
  expect(onLay).toHaveBeenCalledWith(
    new Map([
      [2027, -1.5],
      [2028, 2],
    ]),
  );
  fireEvent.click(screen.getByLabelText('by their years'));
  expect(screen.getByText(/None of them falls in the simulated years 2027 to 2029/)).toBeTruthy();
});
