import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Comparison } from '#contract/comparisons.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { DecisionBox } from './decision-box.tsx';
import { smallComparison } from './testing/small-comparison.ts';

afterEach(cleanup);

function show(changes: Partial<Comparison> = {}, props: { mayDecide?: boolean; error?: unknown } = {}) {
  const onDecide = vi.fn();
  render(
    <DecisionBox
      comparison={{ ...smallComparison(8), done: 8, ...changes }}
      mayDecide
      working={false}
      busy={false}
      error={undefined}
      onDecide={onDecide}
      onFiles={vi.fn()}
      {...props}
    />,
  );
  return onDecide;
}
const record = () => screen.getByRole<HTMLButtonElement>('button', { name: 'Record decision' });

describe('DecisionBox', () => {
  it('wants an option and a reason, and hands over what was written', () => {
    const onDecide = show();
    expect(record().disabled).toBe(true);
    fireEvent.click(screen.getByRole('radio', { name: 'Clumps' }));
    expect(record().disabled).toBe(true);
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: '   ' } });
    expect(record().disabled).toBe(true);
    fireEvent.submit(screen.getByRole('form', { name: 'Record a decision' }));
    expect(onDecide).not.toHaveBeenCalled();
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'Closes sooner.' } });
    fireEvent.change(screen.getByLabelText('Reservations, if any'), { target: { value: 'Survey again.' } });
    fireEvent.click(record());
    expect(onDecide).toHaveBeenCalledExactlyOnceWith({
      optionId: '2',
      reason: 'Closes sooner.',
      reservations: 'Survey again.',
    });
  });

  it('waits for two futures of each option', () => {
    show({ done: 1 });
    fireEvent.click(screen.getByRole('radio', { name: 'Wait' }));
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'Enough.' } });
    expect(record().disabled).toBe(true);
    expect(screen.getByText('Two futures of each option at least must be done.')).toBeTruthy();
  });

  it('says who decides to those who do not', () => {
    show({}, { mayDecide: false });
    expect(screen.getByText('Still open. Managers and admins of the team decide.')).toBeTruthy();
    expect(screen.queryByRole('form')).toBeNull();
  });

  it('keeps what was written where the server refuses', () => {
    show({}, { error: ProblemError.unreachable() });
    expect(screen.getByText('Not recorded.')).toBeTruthy();
    expect(record()).toBeTruthy();
  });

  it('shows a decision with its reason, reservations and name, and asks no more', () => {
    show({
      decision: {
        optionId: '2',
        optionName: 'Clumps',
        reason: 'Closes sooner.',
        reservations: 'Survey again.',
        decidedAt: '2026-12-01T10:00:00.000Z',
        decidedBy: 'Somebody',
      },
    });
    const text = screen.getByRole('region', { name: 'Decision' }).textContent;
    for (const words of ['Clumps', 'Closes sooner.', 'Reservations: Survey again.', 'Somebody, '])
      expect(text).toContain(words);
    expect(screen.queryByRole('form')).toBeNull();
  });
});
