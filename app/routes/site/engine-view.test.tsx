import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, expect, it } from 'vitest';
import type { GroundFacts } from '#app/workers/engine-ground.ts';
import { Warnings } from './engine-view.tsx';

afterEach(cleanup);

const good: GroundFacts = {
  plantable: 10,
  meanCapacity: 1,
  meanVigour: 1,
  meanExposure: 0,
  sheltered: 0,
  shelter: 0,
  barren: 0,
  barrenShelter: 0,
  fenced: 0,
  covered: 3,
  stranded: 0,
  overfull: 0,
  withoutElevation: 0,
};
const warn = (facts: Partial<GroundFacts>) =>
  render(<Warnings facts={{ ...good, ...facts }} area={(cells) => `${4 * cells} m²`} />);

it('says nothing where nothing is left out', () => {
  expect(warn({}).container.textContent).toBe('');
});

it('names what is left out or cut, and how much of it', () => {
  warn({
    plantable: 0,
    stranded: 3,
    overfull: 1,
    withoutElevation: 2,
    shelter: 6,
    barren: 4,
    barrenShelter: 2,
  });
  expect(screen.getByText(/no run can start/)).toBeTruthy();
  expect(screen.getByText(/cannot hold the plant \(3 cells, 12 m²\)/)).toBeTruthy();
  expect(
    screen.getByText(/refuge lies on .* \(4 cells, 16 m², 25 % of all refuge\); it shelters nothing/),
  ).toBeTruthy();
  expect(screen.getByText(/above what the ground can hold \(1 cell, 4 m²\)/)).toBeTruthy();
  expect(screen.getByText(/Elevation is missing .* \(2 cells, 8 m²\)/)).toBeTruthy();
});
