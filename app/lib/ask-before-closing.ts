const ask = (event: BeforeUnloadEvent) => {
  event.preventDefault();
};
const working = new Map<string, number>();

/**
 * Closing the tab would end or pause the work: the browser asks first, as long as there is any.
 *
 * @param kind whose work it is; @param active how many of that kind are at work
 */
export function askBeforeClosing(kind: string, active: number): void {
  working.set(kind, active);
  if ([...working.values()].some((count) => count > 0)) window.addEventListener('beforeunload', ask);
  else window.removeEventListener('beforeunload', ask);
}
