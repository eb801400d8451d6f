import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { Progress } from './progress.tsx';

afterEach(cleanup);

describe('Progress', () => {
  it('says how far it is and how long it will take', () => {
    render(
      <Progress label="89 of 150 years" done={89} of={150} secondsLeft={98} note="cancelling keeps the 89" />,
    );
    const bar = screen.getByRole('progressbar', { name: '89 of 150 years' });
    expect(bar.getAttribute('aria-valuenow')).toBe('59');
    expect(bar.getAttribute('aria-valuetext')).toBe(
      '89 of 150 years, 1 min 40 s left; cancelling keeps the 89',
    );
    expect(bar.querySelectorAll('rect.fill-ink')).toHaveLength(59);
  });

  it.each([
    [0, 0, 0],
    [5, 4, 100],
  ])('%d of %d stays on the rule', (done, of, percent) => {
    render(<Progress label="years" done={done} of={of} />);
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe(String(percent));
  });
});
