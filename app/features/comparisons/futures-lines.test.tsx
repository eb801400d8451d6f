import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { FuturesLines } from './futures-lines.tsx';
import { smallComparison } from './testing/small-comparison.ts';

afterEach(cleanup);

const { plan } = smallComparison(4);
const record = (
  replicate: number,
  recoveredYear: number | null,
  droughtYear: number | null,
  lostYear: number | null = null,
) => ({ replicate, recoveredYear, droughtYear, lostYear }) as ReplicateRecord;
/** By how long before the next drought: the fourth, the first, the third; the second is still open. */
const records = [
  record(0, 2027.4, 2029),
  record(1, null, 2024),
  record(2, 2030, 2026, 2031),
  record(3, 2025, null),
];
const show = (some = records) => (
  <FuturesLines plan={plan} name="Clumps" records={some}>
    {({ replicate }) => <i>asked for {replicate}</i>}
  </FuturesLines>
);
const slider = () => screen.getByRole('slider', { name: /^Futures of Clumps/ });
const said = () => slider().getAttribute('aria-valuetext');
const press = (key: string) => fireEvent.keyDown(slider(), { key });

describe('FuturesLines', () => {
  it('goes through the futures by keyboard, from the one that closes longest before the drought', () => {
    render(show());
    expect(said()).toBe('none picked');
    press('ArrowRight');
    expect(said()).toBe('Future 4: recovered in 2025, no drought by 2032');
    press('ArrowRight');
    expect(said()).toBe('Future 1: recovered in 2028, drought in 2029');
    press('ArrowUp');
    expect(said()).toBe('Future 3: recovered in 2030, drought in 2026, lost again in 2031');
    press('PageUp');
    expect(said()).toBe('Future 2: still open in 2032, drought in 2024');
    expect(slider().getAttribute('aria-valuenow')).toBe('4');
    expect(screen.getByText('asked for 1')).toBeTruthy();
    press('ArrowLeft');
    expect(slider().getAttribute('aria-valuenow')).toBe('3');
    press('Home');
    expect(said()).toMatch(/^Future 4/);
    press('ArrowLeft');
    expect(said()).toMatch(/^Future 4/);
    press('End');
    expect(said()).toMatch(/^Future 2/);
    expect(fireEvent.keyDown(slider(), { key: 'a' })).toBe(true);
  });

  it('keeps the future that is picked when others come before it', () => {
    const { rerender } = render(show(records.slice(0, 2)));
    press('Home');
    expect(said()).toMatch(/^Future 1:/);
    rerender(show());
    expect(said()).toMatch(/^Future 1:/);
    expect(slider().getAttribute('aria-valuenow')).toBe('2');
  });
});
