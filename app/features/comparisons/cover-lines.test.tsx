import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { CoverLines } from './cover-lines.tsx';
import { smallComparison } from './testing/small-comparison.ts';

afterEach(cleanup);

const { plan } = smallComparison(4, { mapYears: [2022, 2024, 2026, 2028, 2030, 2032] });
const fan = [0, 1, 2, 3, 4].map((q) => Float64Array.from({ length: 13 }, (_, i) => (q + 1) * i));
const figures = {
  options: [
    { name: 'Wait', wait: true, summary: { fan } },
    { name: 'Clumps', wait: false, summary: { fan: fan.map((values) => values.map((v) => 2 * v)) } },
  ],
} as unknown as OutlookFigures;

describe('CoverLines', () => {
  it('moves through the kept years by keyboard and no further', () => {
    const onYear = vi.fn();
    const at = (year: number) => <CoverLines {...{ plan, figures, year, onYear }} closing={false} />;
    const { rerender } = render(at(2026));
    const slider = screen.getByRole('slider', { name: 'Year that the maps show' });
    const press = (key: string) => {
      onYear.mockClear();
      const free = fireEvent.keyDown(slider, { key });
      return free ? undefined : (onYear.mock.calls[0][0] as number);
    };
    expect(press('ArrowRight')).toBe(2028);
    expect(press('ArrowLeft')).toBe(2024);
    expect(press('Home')).toBe(2022);
    expect(press('End')).toBe(2032);
    expect(press('PageUp')).toBe(2032);
    expect(press('PageDown')).toBe(2022);
    expect(press('x')).toBeUndefined();
    rerender(at(2032));
    expect(press('ArrowRight')).toBe(2032);
  });

  it('says the year and the median cover of every option', () => {
    render(<CoverLines {...{ plan, figures, year: 2026, onYear: vi.fn() }} closing={false} />);
    // The sixth year after 2020: the middle of the fan is three a year, and twice that.
    expect(screen.getByRole('slider').getAttribute('aria-valuetext')).toBe('2026; Wait 18 m²; Clumps 36 m²');
    expect(
      screen.getByRole('row', { name: '2026 18 m² (12 m² to 24 m²) 36 m² (24 m² to 48 m²)', hidden: true }),
    ).toBeTruthy();
  });
});
