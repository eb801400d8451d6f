/** Futures of an outlook that a run may take. */
export const mostFutures = 100_000;

/** The number of a future as typed, counted from 1; undefined where it is none. */
export function readFuture(text: string): number | undefined {
  const typed = text.trim();
  const future = Number(typed);
  return /^\d+$/.test(typed) && future >= 1 && future <= mostFutures ? future : undefined;
}
