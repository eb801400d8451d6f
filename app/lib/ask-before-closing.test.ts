import { expect, it } from 'vitest';
import { askBeforeClosing } from './ask-before-closing.ts';

/** Whether the browser would ask before the tab is closed. */
const asks = () => {
  const event = new Event('beforeunload', { cancelable: true });
  window.dispatchEvent(event);
  return event.defaultPrevented;
};

it('asks as long as work of any kind is going on', () => {
  expect(asks()).toBe(false);
  askBeforeClosing('runs', 1);
  askBeforeClosing('comparisons', 2);
  expect(asks()).toBe(true);
  askBeforeClosing('runs', 0);
  expect(asks()).toBe(true);
  askBeforeClosing('comparisons', 0);
  expect(asks()).toBe(false);
});
