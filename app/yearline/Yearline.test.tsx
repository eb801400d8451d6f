import { act, cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { useState } from 'react';
import { Yearline, type YearlineProps } from './Yearline.tsx';
import { YearlineTable } from './YearlineTable.tsx';
import type { YearRecord } from './year-records.ts';

const width = 1440;
const record = (year: number, coverShare: number, closingArea = 12_000): YearRecord => ({
  year,
  droughtIndex: year === 2026 ? null : 0,
  coverShare,
  closingArea,
  closedArea: (year - 2026) * closingArea,
  coveredArea: 0,
});
const droughtIndex = [0.5, -0.4, -3.5, 1, 0];
const records = [0.5, 0.6, 0.7, 0.3, 0.4, 0.5].map((c, i) => record(2026 + i, c));

beforeEach(() => {
  vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(width);
  vi.spyOn(HTMLElement.prototype, 'setPointerCapture').mockImplementation(() => undefined);
  vi.spyOn(HTMLElement.prototype, 'hasPointerCapture').mockReturnValue(true);
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  vi.useRealTimers();
});

function Harness(props: Partial<YearlineProps> & { start?: number; seen?: number[] }) {
  const { start = 2027, seen, ...rest } = props;
  const [year, setYear] = useState(start);
  return (
    <Yearline
      surveyYear={2026}
      lastYear={2031}
      year={year}
      onYear={(y) => {
        seen?.push(y);
        setYear(y);
      }}
      droughtIndex={droughtIndex}
      tolerances={{ open: -2.3, nearMound: -4.2 }}
      records={records}
      {...rest}
    />
  );
}
const slider = () => screen.getByRole('slider');
const now = () => slider().getAttribute('aria-valuenow');

describe('Yearline', () => {
  it('says the year in words: cover, index, what closed, what is dated there', () => {
    render(<Harness start={2028} pins={[{ year: 2028, label: '18 mounds' }]} />);
    expect(slider().getAttribute('aria-valuetext')).toBe(
      '2028: cover 70 %, index −0.4, 1.2 ha closed, 18 mounds',
    );
    expect(slider().getAttribute('aria-valuemin')).toBe('2026');
    expect(slider().getAttribute('aria-valuemax')).toBe('2031');
  });

  it('moves by keys and stays inside', () => {
    render(<Harness />);
    const press = (key: string) => fireEvent.keyDown(slider(), { key });
    press('ArrowRight');
    expect(now()).toBe('2028');
    press('Home');
    press('ArrowLeft');
    expect(now()).toBe('2026');
    press('PageUp');
    expect(now()).toBe('2031');
    press('ArrowRight');
    expect(now()).toBe('2031');
  });

  it('goes to the year that is clicked, and follows a drag', () => {
    render(<Harness />);
    const x = (year: number) => 196 + ((width - 104 - 196) / 5) * (year - 2026);
    fireEvent.pointerDown(slider(), { clientX: x(2029) + 20, pointerId: 1, button: 0 });
    expect(now()).toBe('2029');
    fireEvent.pointerMove(slider(), { clientX: x(2030), pointerId: 1 });
    expect(now()).toBe('2030');
    fireEvent.pointerMove(slider(), { clientX: 5000, pointerId: 1 });
    expect(now()).toBe('2031');
  });

  it('shows no year that a growing run has not reached', () => {
    render(<Harness records={records.slice(0, 3)} />);
    fireEvent.keyDown(slider(), { key: 'End' });
    expect(now()).toBe('2028');
    expect(slider().getAttribute('aria-valuemax')).toBe('2028');
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'On one year' }).disabled).toBe(true);
  });

  it('plays four years a second to the end, then stops', () => {
    vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
    const seen: number[] = [];
    render(<Harness seen={seen} start={2028} />);
    fireEvent.keyDown(slider(), { key: ' ' });
    expect(screen.getByRole('button', { name: 'Pause' })).toBeTruthy();
    for (let i = 0; i < 10; i++)
      act(() => {
        vi.advanceTimersByTime(250);
      });
    expect(seen).toEqual([2029, 2030, 2031]);
    expect(screen.getByRole('button', { name: 'Play' })).toBeTruthy();
    expect(vi.getTimerCount()).toBe(0);
  });

  it('does not start by itself where less motion was asked for', () => {
    const asked = vi.spyOn(window, 'matchMedia');
    asked.mockReturnValue({ matches: true } as MediaQueryList);
    render(<Harness autoPlay />);
    expect(screen.getByRole('button', { name: 'Play' })).toBeTruthy();
    cleanup();
    asked.mockReturnValue({ matches: false } as MediaQueryList);
    render(<Harness autoPlay />);
    expect(screen.getByRole('button', { name: 'Pause' })).toBeTruthy();
  });

  it('hangs a bar for each dry year alone, and turns it to ink past tolerance', () => {
    const { container } = render(<Harness />);
    const bars = [...container.querySelectorAll('rect')].filter((r) => r.getAttribute('y') === '105');
    expect(bars.map((b) => b.getAttribute('fill'))).toEqual(['var(--color-shore)', 'var(--color-ink)']);
    expect(Number(bars[1].getAttribute('height'))).toBeGreaterThan(Number(bars[0].getAttribute('height')));
  });

  it.each([1440, 390])('writes its scales beside the plot at %i px', (wide) => {
    vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(wide);
    const { container } = render(<Harness />);
    const words = [...container.querySelectorAll('text')].map((text) => text.textContent);
    expect(words).toEqual(expect.arrayContaining(['100 %', '50', '0', '−2', '−4']));
  });

  it('stands without a run: weather and works alone', () => {
    const { container } = render(<Harness records={[]} pins={[{ year: 2029, label: 'fence' }]} />);
    expect(slider().getAttribute('aria-valuetext')).toBe('2027: index 0.5');
    expect(container.textContent).toContain('fence');
    expect(container.innerHTML).not.toContain('NaN');
  });
});

describe('YearlineTable', () => {
  it('has a row a year with everything that the picture shows', () => {
    render(
      <YearlineTable
        surveyYear={2026}
        lastYear={2031}
        droughtIndex={droughtIndex}
        tolerances={{ open: -2.3 }}
        records={records.slice(0, 4)}
        compare={{ label: 'Wait', records }}
        notes={[{ year: 2029, label: '18 mounds' }]}
      />,
    );
    const rows = screen.getAllByRole('row').map((r) => [...r.children].map((c) => c.textContent));
    expect(rows).toHaveLength(7);
    expect(rows[1]).toEqual(['2026', '–', '50 %', '50 %', '–', '0 m²', '']);
    expect(rows[4]).toEqual([
      '2029',
      '−3.5',
      '30 %',
      '30 %',
      '1.2 ha',
      '3.6 ha',
      'drought past tolerance, 18 mounds',
    ]);
    expect(rows[6]).toEqual(['2031', '0', '–', '50 %', '–', '–', '']);
  });
});
