import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { getTheme, getThemeChoice, setThemeChoice, startTheme, subscribeTheme } from './theme.ts';

const shown = () => document.documentElement.dataset.theme;
let systemDark = false;
let systemChanged: () => void = () => undefined;

beforeEach(() => {
  systemDark = false;
  localStorage.clear();
  vi.spyOn(window, 'matchMedia').mockImplementation(
    () =>
      ({
        get matches() {
          return systemDark;
        },
        addEventListener: (_: string, listener: () => void) => (systemChanged = listener),
      }) as unknown as MediaQueryList,
  );
  startTheme();
});
afterEach(() => {
  vi.restoreAllMocks();
});

describe('theme', () => {
  it('follows the system until somebody chooses', () => {
    expect(shown()).toBe('light');
    systemDark = true;
    systemChanged();
    expect(shown()).toBe('dark');
    setThemeChoice('light');
    expect(shown()).toBe('light');
    systemChanged();
    expect(shown()).toBe('light');
  });

  it('keeps the choice on this browser and tells who listens', () => {
    const heard = vi.fn();
    const stop = subscribeTheme(heard);
    setThemeChoice('dark');
    stop();
    expect(heard).toHaveBeenCalledOnce();
    expect(localStorage.getItem('foothold.theme')).toBe('dark');
    expect([getThemeChoice(), getTheme()]).toEqual(['dark', 'dark']);
  });

  it('takes what it does not know for no choice', () => {
    localStorage.setItem('foothold.theme', 'sepia');
    expect(getThemeChoice()).toBe('system');
  });

  it('still changes where the browser keeps nothing', () => {
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new DOMException('denied', 'SecurityError');
    });
    setThemeChoice('dark');
    expect(shown()).toBe('dark');
    vi.restoreAllMocks();
    setThemeChoice('system');
  });
});
