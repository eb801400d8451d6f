import { readFileSync } from 'node:fs';
import type { Browser, Page } from '@playwright/test';

/** What a page takes while it works, seen from outside of it. */
export interface PageWatch {
  /** seconds of the processor that the page with its workers has taken since its process began */
  readonly processorSeconds: () => Promise<number>;
  /** bytes that the page's process holds in memory now */
  readonly memory: () => Promise<number>;
  /** milliseconds since the page was loaded: the longest task, and the longest wait from a press to the next picture */
  readonly waits: () => Promise<{ task: number; press: number; presses: number }>;
}

declare global {
  interface Window {
    footholdWaits?: { task: number; press: number; presses: number };
  }
}

/** Watches a page from its next load on. */
export async function watchPage(browser: Browser, page: Page): Promise<PageWatch> {
  await page.addInitScript(() => {
    const waits = (window.footholdWaits = { task: 0, press: 0, presses: 0 });
    new PerformanceObserver((list) => {
      for (const { duration } of list.getEntries()) waits.task = Math.max(waits.task, duration);
    }).observe({ type: 'longtask', buffered: true });
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries() as (PerformanceEntry & { interactionId: number })[]) {
        if (entry.interactionId === 0) continue;
        waits.presses++;
        waits.press = Math.max(waits.press, entry.duration);
      }
    }).observe({ type: 'event', buffered: true, durationThreshold: 16 } as PerformanceObserverInit);
  });
  const session = await browser.newBrowserCDPSession();
  /** The busiest of the renderers: the browser keeps a spare one that does nothing. */
  const renderer = async () => {
    const { processInfo } = await session.send('SystemInfo.getProcessInfo');
    return processInfo.filter(({ type }) => type === 'renderer').sort((a, b) => b.cpuTime - a.cpuTime)[0];
  };
  return {
    processorSeconds: async () => (await renderer()).cpuTime,
    memory: async () => {
      const { id } = await renderer();
      const status = readFileSync(`/proc/${id}/status`, 'utf8');
      return 1024 * Number(/^VmRSS:\s+(\d+)/m.exec(status)?.[1]);
    },
    waits: async () => page.evaluate(() => window.footholdWaits!),
  };
}
