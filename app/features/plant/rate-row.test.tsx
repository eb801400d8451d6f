import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, expect, it } from 'vitest';
import { plantSchema, type Plant } from '#contract/plants.ts';
import { defaultRates, parameters } from '#sim-core/spec/parameters.ts';
import { believe, plantErrors, plantOf, startPlant, tellSource } from './plant-draft.ts';
import { RateRows } from './rate-row.tsx';

afterEach(cleanup);

function show(editable = true, plant = plantSchema.parse({ name: 'Grass', rates: defaultRates })) {
  let saved: Plant = plant;
  function Rows() {
    const [draft, setDraft] = useState(() => startPlant(plant));
    saved = plantOf(draft);
    const errors = plantErrors(draft, []);
    return (
      <RateRows
        table={parameters}
        names={['lateralSpread']}
        sheet={draft.rates}
        errors={errors.rates}
        editable={editable}
        knowledge={{
          beliefs: draft.beliefs,
          beliefErrors: errors.beliefs,
          sources: draft.sources,
          onBelief: (name, belief) => setDraft(believe(draft, name, belief)),
          onSource: (name, source) => setDraft(tellSource(draft, name, source)),
        }}
        onChange={(rates) => setDraft({ ...draft, rates: rates as typeof draft.rates })}
      />
    );
  }
  render(<Rows />);
  return () => saved;
}
const type = (label: string, value: string) =>
  fireEvent.change(screen.getByLabelText(label), { target: { value } });

it('a rate becomes a triangular law; single runs take its mode, and back to one value forgets it', () => {
  const saved = show();
  fireEvent.click(screen.getByRole('button', { name: 'Not sure? Say so for lateral spread' }));
  type('Lateral spread: known as', 'triangular');
  type('Lateral spread: lowest', '0,2');
  type('Lateral spread: most likely', '0.6');
  type('Lateral spread: highest', '1.5');
  expect(saved().beliefs).toEqual({ lateralSpread: { law: 'triangular', low: 0.2, mode: 0.6, high: 1.5 } });
  expect(saved().rates.lateralSpread).toBe(0.6);
  expect(screen.getByLabelText(/^Lateral spread, c/)).toHaveProperty('readOnly', true);
  expect(screen.getByText(/between 0.2 and 1.5, most likely 0.6 m\/yr/)).toBeTruthy();
  type('Lateral spread: known as', 'fixed');
  expect(saved().beliefs).toEqual({});
  expect(saved().rates.lateralSpread).toBe(0.6);
});

it('says what is wrong with a law, and keeps the value that made sense', () => {
  const saved = show();
  fireEvent.click(screen.getByRole('button', { name: /Say so|belief or source/ }));
  type('Lateral spread: known as', 'uniform');
  type('Lateral spread: highest', '99');
  expect(screen.getByRole('alert').textContent).toMatch(/Found 99; Lateral spread must lie between/);
  expect(screen.getByLabelText('Lateral spread: highest').getAttribute('aria-invalid')).toBe('true');
  expect(saved().beliefs).toEqual({});
});

it('keeps how sure a rate is and where it comes from; a reader sees both and changes neither', () => {
  const saved = show();
  fireEvent.click(screen.getByRole('button', { name: /Say so|belief or source/ }));
  type('How sure', 'measured here');
  type('Where it comes from', ' Staked edges, 2025 ');
  expect(saved().sources.lateralSpread).toEqual({ sure: 'measured here', source: 'Staked edges, 2025' });
  cleanup();
  show(false, saved());
  expect(screen.getByText('Measured here')).toBeTruthy();
  expect(screen.queryByRole('button')).toBeNull();
});
