import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { ProblemError } from '#app/lib/api-client.ts';
import { ProblemNotice } from './notice.tsx';

afterEach(cleanup);
const refused = (parts: object) =>
  ProblemError.fromReply(
    422,
    JSON.stringify({
      type: '/problems/raster-bands',
      title: 'Too many bands',
      status: 422,
      detail: 'Found five bands.',
      code: 'raster-bands',
      ...parts,
    }),
  );

describe('ProblemNotice', () => {
  it('lays out what was found, what was expected and how to mend it', () => {
    render(
      <ProblemNotice error={refused({ found: 'five bands', expected: 'one band', remedy: 'Export one.' })} />,
    );
    const alert = screen.getByRole('alert');
    expect(alert.textContent).toContain('Too many bands');
    const terms = screen.getAllByRole('term').map((term) => term.textContent);
    const words = screen.getAllByRole('definition').map((definition) => definition.textContent);
    expect(terms).toEqual(['Found', 'Expected', 'To mend it']);
    expect(words).toEqual(['five bands', 'one band', 'Export one.']);
  });

  it('shows the detail where there are no parts', () => {
    render(<ProblemNotice error={refused({})} />);
    expect(screen.getByRole('alert').textContent).toBe('Found five bands.');
  });

  it('has words for whatever was thrown', () => {
    render(<ProblemNotice error="?" />);
    expect(screen.getByRole('alert').textContent).toBe('Something went wrong on this page.');
  });
});
